import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { type Browser, chromium, type Page } from 'playwright-core';

/** Debian's Chromium, kept from calling home: a closed network would only slow it down. */
const LAUNCH = {
  executablePath: '/usr/bin/chromium',
  args: [
    '--no-sandbox',
    // A container's /dev/shm may be too small for a page; it takes temporary files then.
    '--disable-dev-shm-usage',
    '--disable-gpu',
    '--disable-quic',
    '--disable-sync',
    '--disable-background-networking',
    '--disable-component-update',
    '--no-first-run',
  ],
};

export function launchBrowser(): Promise<Browser> {
  return chromium.launch(LAUNCH);
}

export type AxeViolation = { readonly id: string; readonly help: string; readonly targets: readonly string[] };

type AxeResults = {
  readonly violations: readonly {
    readonly id: string;
    readonly help: string;
    readonly nodes: readonly { readonly target: readonly unknown[] }[];
  }[];
};

/** WCAG 2.2 levels A and AA: what the screens promise. */
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

/**
 * What axe finds wrong on a page as it stands; an empty array is a pass. The checker is evaluated through the
 * debugger, so that the page's Content-Security-Policy stays in force for the page itself.
 */
export async function listAxeViolations(page: Page): Promise<AxeViolation[]> {
  const source = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
  await page.evaluate(source);
  const results = await page.evaluate((tags) => {
    const { axe } = globalThis as unknown as {
      axe: { run: (root: Document, options: object) => Promise<AxeResults> };
    };
    return axe.run(document, { runOnly: { type: 'tag', values: tags }, resultTypes: ['violations'] });
  }, TAGS);
  return results.violations.map(({ id, help, nodes }) => ({
    id,
    help,
    targets: nodes.map(({ target }) => target.join(' ')),
  }));
}
