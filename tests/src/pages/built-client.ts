import { join } from 'node:path';
import { buildClient, isClientBuilt } from '#server/bootstrap/build-client.mjs';

const PROJECT = join(import.meta.dirname, '../../..');

/** The folder of the client as people get it, built from the sources as they are now. */
export async function builtClient(): Promise<string> {
  if (!isClientBuilt(PROJECT)) await buildClient(PROJECT);
  return join(PROJECT, 'dist');
}
