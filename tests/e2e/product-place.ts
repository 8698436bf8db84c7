import { chmodSync, mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { PORTS } from '#server/bootstrap/settings.mjs';
import { findFreePort } from '#tests/support/free-port.ts';

/** Where one product runs: its folder and its ports. */
export type ProductPlace = {
  /** Holds the data folder, the output of the start program and its process number. */
  readonly folder: string;
  /** `NAME=value` in the environment of everything that the product starts. */
  readonly mark: string;
  readonly ports: Readonly<Record<keyof typeof PORTS, number>>;
};

/** A new folder below the test run's own, and ports that nobody listens on. */
export async function makeProductPlace(): Promise<ProductPlace> {
  const folder = mkdtempSync(join(process.env.MILLRACE_TEST_RUN ?? tmpdir(), 'millrace-product-'));
  // PostgreSQL's account passes through it to a folder of its own.
  chmodSync(folder, 0o711);
  const names = Object.keys(PORTS) as (keyof typeof PORTS)[];
  const ports: Partial<Record<keyof typeof PORTS, number>> = {};
  for (const name of names) ports[name] = await findUnlike(Object.values(ports));
  return { folder, mark: `MILLRACE_TEST_PRODUCT=${folder}`, ports: ports as ProductPlace['ports'] };
}

async function findUnlike(taken: readonly number[]): Promise<number> {
  const port = await findFreePort();
  return taken.includes(port) ? findUnlike(taken) : port;
}
