import { fileURLToPath } from 'node:url';
import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
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

export default defineConfig({
  plugins: [react(), tailwindcss()],
  // The script before the first paint and the mark: files that the page names itself.
  publicDir: 'src/static',
  build: {
    outDir: 'dist',
    target: 'es2023',
    // Fonts stay files: the Content-Security-Policy allows no data: sources.
    assetsInlineLimit: 0,
    modulePreload: { polyfill: false },
  },
  server: {
    port: 4320,
    strictPort: true,
    proxy: { '/api': { target: `http://127.0.0.1:${serverPort}`, ws: true } },
  },
  test: {
    // Two cores: more workers only make every test slower.
    maxWorkers: 2,
    testTimeout: 20_000,
    hookTimeout: 60_000,
    setupFiles: [place('./tests/support/fast-check-defaults.ts')],
    projects: [
      project('architecture', ['tests/architecture/**/*.test.ts']),
      project('pure', ['tests/{shared,simulator,src}/**/*.test.{ts,tsx}']),
      project('server', ['tests/server/**/*.test.ts'], { globalSetup: withPostgres }),
      project('e2e', ['tests/e2e/**/*.test.ts'], {
        globalSetup: withPostgres,
        fileParallelism: false,
        testTimeout: 120_000,
      }),
    ],
  },
});
