import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import type { Plugin } from 'vite';
import { defineConfig, type ViteUserConfig } from 'vitest/config';

/** One repository-relative place, as an absolute path. */
const place = (path: string) => fileURLToPath(new URL(path, import.meta.url));

/** Where the development page finds the server; the same variable moves the server itself. */
const serverPort = Number(process.env.PORT ?? 4310);

type Project = NonNullable<NonNullable<ViteUserConfig['test']>['projects']>[number];

/** A project whose files need PostgreSQL: its global set-up starts one only when a file of the project runs. */
const withPostgres = ['./tests/support/start-test-cluster.ts'];

const project = (name: string, include: string[], more: object = {}): Project => ({
  extends: true,
  test: { name, include, environment: 'node', ...more },
});

/** The tests of single pages in a browser, on a network of the tests' own. */
const PAGES = 'tests/src/pages/**/*.test.ts';

/** The server's tests that start, end or replace programs and modules, or listen to a process: each has one of its own. */
const APART = ['bootstrap/**/*', '*', 'fold/quarantine', 'log/*', 'backtest/backtest-command'].map(
  (file) => `tests/server/${file}.test.ts`,
);

/** Parts of the schema library that write JSON Schema: only the server's interface description needs them. */
const JSON_SCHEMA_WRITER =
  /[\\/]zod[\\/]v4[\\/]core[\\/](?:json-schema-processors|json-schema-generator|to-json-schema)\.js$/;

/** Leaves the JSON Schema writer out of the client, whose schemas hold on to it and never use it: 5 kB of the first load. */
const withoutJsonSchemaWriter: Plugin = {
  name: 'without-json-schema-writer',
  apply: 'build',
  enforce: 'pre',
  load: (id) => {
    if (!JSON_SCHEMA_WRITER.test(id)) return null;
    const names = readFileSync(id, 'utf8').matchAll(/^export (?:const|function|class) (\w+)/gm);
    return [...names].map(([, name]) => `export const ${name} = () => undefined;`).join('\n');
  },
};

/** Where everybody begins, and the pages most see first. */
const FIRST_PAGES = ['src/main.tsx', 'src/app/routes/sign-in-page.tsx', 'src/app/routes/fleet-page.tsx'].map(place);

type ModuleGraph = { getModuleInfo(id: string): { readonly importedIds: readonly string[] } | null };

/** Everything that the first pages need before they run, without the pages themselves. */
function listFirstLoad(graph: ModuleGraph): ReadonlySet<string> {
  const reached = new Set<string>();
  const reach = (id: string): void => {
    if (reached.has(id)) return;
    reached.add(id);
    for (const imported of graph.getModuleInfo(id)?.importedIds ?? []) reach(imported);
  };
  for (const page of FIRST_PAGES) reach(page);
  for (const page of FIRST_PAGES) reached.delete(page);
  return reached;
}

const firstLoads = new WeakMap<object, ReadonlySet<string>>();

/** One file for what every first visit loads: in thirty small ones the same code takes 4 kB more. */
const nameFirstLoad = (id: string, graph: ModuleGraph): string | null => {
  const known = firstLoads.get(graph) ?? listFirstLoad(graph);
  firstLoads.set(graph, known);
  return known.has(id) ? 'first' : null;
};

export default defineConfig({
  plugins: [react(), tailwindcss(), withoutJsonSchemaWriter],
  // The script before the first paint and the mark: files that the page names itself.
  publicDir: 'src/static',
  build: {
    outDir: 'dist',
    target: 'es2023',
    // Fonts stay files: the Content-Security-Policy allows no data: sources.
    assetsInlineLimit: 0,
    modulePreload: { polyfill: false },
    rolldownOptions: {
      // No package that the client uses does anything by being read: what nobody calls may go.
      treeshake: { propertyReadSideEffects: false, unknownGlobalSideEffects: false },
      output: {
        codeSplitting: {
          groups: [
            // Packages change seldom: one file that a browser keeps over our own releases. The chart library comes by itself.
            { name: 'packages', test: /node_modules[\\/](?!uplot)/, priority: 2 },
            { name: nameFirstLoad, priority: 1 },
          ],
        },
      },
    },
  },
  server: {
    port: 4320,
    strictPort: true,
    proxy: { '/api': { target: `http://127.0.0.1:${serverPort}`, ws: true } },
  },
  test: {
    // Two cores: more workers only make every test slower.
    maxWorkers: 2,
    // Limits against hanging, not against slowness: a loaded machine may take long.
    testTimeout: 120_000,
    hookTimeout: 120_000,
    expect: { poll: { timeout: 30_000 } },
    // Where nobody watches, a test may fail for want of processor time; one that is wrong fails every time.
    retry: process.env.CI ? 2 : 0,
    setupFiles: [place('./tests/support/fast-check-defaults.ts')],
    projects: [
      project('architecture', ['tests/architecture/**/*.test.ts']),
      // Where a file leaves nothing behind in its process, files share one: starting it cost more than most files take.
      project('pure', ['tests/{shared,simulator,src}/**/*.test.{ts,tsx}'], { exclude: [PAGES], isolate: false }),
      project('pages', [PAGES], { isolate: false }),
      project('server', ['tests/server/**/*.test.ts'], { exclude: APART, globalSetup: withPostgres, isolate: false }),
      project('apart', APART, { globalSetup: withPostgres }),
      project('e2e', ['tests/e2e/**/*.test.ts']),
    ],
  },
});
