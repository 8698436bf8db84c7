import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';
import { buildClient, isClientBuilt } from '#server/bootstrap/build-client.mjs';
import type { Bench } from './bench.ts';

const PROJECT = fileURLToPath(new URL('../../', import.meta.url));
const DIST = join(PROJECT, 'dist');

/** What the page names in its head: scripts, what they preload, styles. */
const NAMED_IN_PAGE = /(?:src|href)="\/([^"]+\.(?:js|css))"/g;
/** What a module needs before it runs; a dynamic import has a parenthesis instead. */
const STATIC_IMPORT = /(?:from|import)\s*"\.\/([^"]+\.js)"/g;

/** Everything that opening the fleet costs on a first visit: the page, its scripts and styles, and the route's own. */
export const clientBytes: Bench = {
  name: 'client-bytes',
  about: 'what a first visit to the fleet loads, compressed',
  run: async ({ say }) => {
    if (!isClientBuilt(PROJECT)) {
      say('  building the client');
      await buildClient(PROJECT);
    }
    const page = readFileSync(join(DIST, 'index.html'), 'utf8');
    const route = readdirSync(join(DIST, 'assets')).find((file) => /^fleet-page-.*\.js$/.test(file));
    if (route === undefined) throw new Error('the built client has no fleet page');
    const files = new Set(['index.html', ...[...page.matchAll(NAMED_IN_PAGE)].map(([, file]) => file ?? '')]);
    for (const file of [...files, join('assets', route)]) addWithImports(file, files);
    const bytes = [...files].reduce(
      (sum, file) => sum + gzipSync(readFileSync(join(DIST, file)), { level: 6 }).length,
      0,
    );
    return [
      { name: 'client first load, gzip', value: bytes / 1000, unit: 'kB', atMost: 190 },
      { name: 'files of it', value: files.size, unit: '' },
    ];
  },
};

function addWithImports(file: string, files: Set<string>): void {
  files.add(file);
  if (!file.endsWith('.js')) return;
  for (const [, name] of readFileSync(join(DIST, file), 'utf8').matchAll(STATIC_IMPORT)) {
    const imported = join(dirname(file), name ?? '');
    if (!files.has(imported)) addWithImports(imported, files);
  }
}
