import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect } from 'vitest';
import type { Role } from '#shared/contract/primitives.ts';
import { type FakeServer, startFakeServer } from '#tests/src/fake-api/fake-server.ts';
import { createFakeState, type FakeState } from '#tests/src/fake-api/fake-state.ts';
import { launchBrowser } from '#tests/support/browser.ts';
import { builtClient } from './built-client.ts';

export type Opened = { readonly page: Page; readonly state: FakeState; readonly url: string };

export type OpenOptions = {
  readonly role?: Role;
  readonly size?: number;
  readonly width?: number;
  readonly height?: number;
  readonly theme?: 'light' | 'dark';
  /** Turns the network's state before the page is opened. */
  readonly prepare?: (state: FakeState) => void;
};

/** An expectation that a busy machine may take a while to meet. */
export const eventually = <Value>(read: () => Value | Promise<Value>) =>
  expect.poll(read, { timeout: 20_000, interval: 50 });

/** What a browser reports of refusals that a test provokes on purpose. */
const PROVOKED =
  /status of (401|403|404|409|412|429|500|503)|ERR_INTERNET_DISCONNECTED|ERR_CONNECTION_REFUSED|WebSocket connection to/;

/**
 * A real browser, the built client under the real Content-Security-Policy, and a network of the test's own. Whatever a
 * page complains of on its console fails the test, the policy's violations among it.
 */
export function createPageBench() {
  let browser: Browser;
  let client: string;
  const servers: FakeServer[] = [];
  const complaints: string[] = [];

  beforeAll(async () => {
    client = await builtClient();
    browser = await launchBrowser();
  }, 120_000);
  afterEach(async () => {
    for (const context of browser.contexts()) await context.close();
    await Promise.all(servers.splice(0).map((server) => server.close()));
    expect(complaints.splice(0)).toEqual([]);
  });
  afterAll(async () => browser?.close());

  const openPage = async (
    url: string,
    { width = 1440, height = 1000, theme = 'light' }: OpenOptions,
  ): Promise<Page> => {
    const context = await browser.newContext({
      viewport: { width, height },
      colorScheme: theme,
      locale: 'en-US',
      // A reader far from the pads: times must be the pads' all the same.
      timezoneId: 'Europe/Berlin',
    });
    const page = await context.newPage();
    page.on('console', (message) => {
      if (['error', 'warning'].includes(message.type()) && !PROVOKED.test(message.text()))
        complaints.push(message.text());
    });
    page.on('pageerror', (error) => complaints.push(error.message));
    await page.goto(url);
    return page;
  };

  return {
    /** Opens one page on a network of its own. */
    open: async (path: string, options: OpenOptions = {}): Promise<Opened> => {
      const state = createFakeState({
        ...(options.role === undefined ? {} : { role: options.role }),
        ...(options.size === undefined ? {} : { size: options.size }),
      });
      options.prepare?.(state);
      const server = await startFakeServer(state, client);
      servers.push(server);
      const page = await openPage(server.url + path, options);
      return { page, state, url: server.url };
    },
    /** Opens another page on the network of the first. */
    openBeside: (opened: Opened, path: string, options: OpenOptions = {}) => openPage(opened.url + path, options),
  };
}
