import { rmSync } from 'node:fs';
import { afterAll, expect } from 'vitest';
import { openProduct, type Product } from './product.ts';
import { makeProductPlace } from './product-place.ts';

/**
 * The product of one test file, on ports and with a database of its own, so that files can run side by side. It is
 * stopped after the file's last test; something that outlives it fails the file. Call it at the top of the file: what
 * is registered first is ended last.
 */
export async function openOwnProduct(): Promise<Product> {
  const place = await makeProductPlace();
  const product = openProduct(place);
  afterAll(async () => {
    await product.stop();
    expect(await product.listRemains()).toEqual([]);
    rmSync(place.folder, { recursive: true, force: true });
  });
  return product;
}
