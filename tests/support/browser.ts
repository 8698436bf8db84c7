import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { type Browser, chromium, type Page } from 'playwright-core';

/**
 * What Chromium is told to do without. The lists under the address bar are pages in a process of their own, two for
 * every window, and cost as much time as the page under test. Chromium heeds the last such list alone: what the driver
 * turns off is written out again before them.
 */
const FEATURES_OFF = [
  'AvoidUnnecessaryBeforeUnloadCheckSync',
  'DestroyProfileOnBrowserClose',
  'HttpsUpgrades',
  'HttpsFirstBalancedModeAutoEnable',
  'LensOverlay',
  'MediaRouter',
  'PaintHolding',
  'ThirdPartyStoragePartitioning',
  'AvoidCorsURLLoaderRestartOnRedirect',
  'OptimizationHints',
  'NetworkTimeServiceQuerying',
  'AimEnabled',
  'PreconnectToSearch',
  'WebUIOmniboxPopup',
  'WebUIOmniboxAimPopup',
];

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
    `--disable-features=${FEATURES_OFF.join(',')}`,
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

let checker: string | undefined;

/** The checker's source, read once: a screen is looked at in several views, and there are many screens. */
function readChecker(): string {
  checker ??= readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
  return checker;
}

/**
 * What axe finds wrong on a page as it stands; an empty array is a pass. The checker is evaluated through the
 * debugger, so that the page's Content-Security-Policy stays in force for the page itself.
 */
export async function listAxeViolations(page: Page): Promise<AxeViolation[]> {
  if (await page.evaluate(() => !('axe' in globalThis))) await page.evaluate(readChecker());
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
