import { rmSync } from 'node:fs';
import type { TestProject } from 'vitest/node';
import { openProduct } from './product.ts';
import { makeProductPlace } from './product-place.ts';

/**
 * One product for all end-to-end tests: the first file that needs it starts it, and here it is stopped after the last.
 * Something that outlives it fails the run.
 */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  const place = await makeProductPlace();
  const product = openProduct(place);
  project.provide('productPlace', place);
  return async () => {
    await product.stop();
    const remains = await product.listRemains();
    if (remains.length > 0) throw new Error(`The product left behind: ${remains.join(', ')}`);
    rmSync(place.folder, { recursive: true, force: true });
  };
}
