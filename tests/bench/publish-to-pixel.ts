import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { launchBrowser } from '#tests/support/browser.ts';
import { findFreePort } from '#tests/support/free-port.ts';
import { createRealProgram } from '#tests/support/real-program.ts';
import { type Bench, quantile } from './bench.ts';
import { BENCH_DEVICE_KEY } from './bench-company.ts';
import { addBenchManager, BENCH_MANAGER } from './bench-manager.ts';
import { startLoad } from './load.ts';
import { connectDevice, type DeviceLogin, publish } from './load-device.ts';
import { fillDatabase } from './watch.ts';

const READINGS_PER_SECOND = 1000;
const WARM_UP_SECONDS = 5;
const SECONDS = 30;
const PROBE_EVERY_MS = 301;
/** What is still on its way when the load ends. */
const LAST_WITHIN_MS = 5000;

/** From a device's publish until its new speed stands on the wall of a manager, in a real browser. */
export const publishToPixel: Bench = {
  name: 'publish-to-pixel',
  about: `from publish to the figure on the wall in Chromium at ${READINGS_PER_SECOND} readings a second`,
  run: async ({ postgres }) => {
    const database = await (await postgres()).createDatabase('publish_to_pixel');
    const devices = await fillDatabase(database, READINGS_PER_SECOND + 1);
    await addBenchManager(database);
    const dataFolder = mkdtempSync(join(tmpdir(), 'millrace-bench-'));
    const ports = { http: await findFreePort(), mqtt: await findFreePort() };
    const url = `http://localhost:${ports.http}`;
    const server = createRealProgram('server/main.ts', {
      // Only the demo is served without TLS, which a browser on this machine has no certificate for.
      MILLRACE_DEMO: '1',
      MILLRACE_HISTORY_DAYS: '0',
      MILLRACE_DATA: dataFolder,
      NODE_ENV: '',
      DATABASE_URL: database.databaseUrl,
      SMTP_URL: 'smtp://127.0.0.1:1',
      PUBLIC_URL: url,
      TOKEN_KEY: 'token-key-of-the-bench-0123456789abcdef',
      DEVICE_KEY: BENCH_DEVICE_KEY,
      PORT: String(ports.http),
      MQTT_PORT: String(ports.mqtt),
      LOG_LEVEL: 'error',
    });
    await server.start();
    const [probe, ...others] = devices;
    if (probe === undefined) throw new Error('no pump to watch');
    const load = await startLoad({ port: ports.mqtt, devices: others, readingsPerMessage: 1, window: 1 });
    const browser = await launchBrowser();
    try {
      const wall = await openWall(browser, url, probe);
      await load.run({ seconds: WARM_UP_SECONDS, messagesPerSecond: READINGS_PER_SECOND });
      const loading = load.run({ seconds: SECONDS, messagesPerSecond: READINGS_PER_SECOND });
      const sentAt = await publishSpeeds(ports.mqtt, probe, loading);
      await wall.waitForFunction(isShown, figureOf(lastOf(sentAt)), { timeout: LAST_WITHIN_MS }).catch(() => undefined);
      const lateness = matchLateness(sentAt, await wall.evaluate(() => (window as unknown as Shown).shown));
      const report = await loading;
      return [
        {
          name: 'publish to pixel p95 at 1,000 readings/s',
          value: quantile(lateness, 0.95),
          unit: 'ms',
          atMost: 800,
        },
        { name: 'publish to pixel p50', value: quantile(lateness, 0.5), unit: 'ms' },
        { name: 'readings that reached the wall', value: lateness.length / sentAt.size, unit: '', atLeast: 0.99 },
        { name: 'readings a second beside the wall', value: report.messages / report.seconds, unit: '' },
      ];
    } finally {
      await browser.close();
      await load.stop();
      await server.killHard();
      await database.drop();
      rmSync(dataFolder, { recursive: true, force: true });
    }
  },
};

/** What the page writes down: a figure, and when it was painted, ms since the epoch. One machine, one clock. */
type Shown = { readonly shown: { readonly figure: string; readonly at: number }[] };

const isShown = (figure: string) => (window as unknown as Shown).shown.some((each) => each.figure === figure);
const figureOf = (rpm: number) => rpm.toLocaleString('en-US');
const lastOf = (sentAt: ReadonlyMap<number, number>) => [...sentAt.keys()].at(-1) ?? 0;

/** A manager's wall of all pumps by name, on which the probed one is the first row. */
async function openWall(browser: Browser, url: string, { serial }: DeviceLogin): Promise<Page> {
  const page = await browser.newPage({ baseURL: url, locale: 'en-US', viewport: { width: 1440, height: 1000 } });
  page.setDefaultTimeout(60_000);
  await page.goto('/fleet?sort=name');
  await page.getByLabel('E-mail address').fill(BENCH_MANAGER.email);
  await page.getByLabel('Password').fill(BENCH_MANAGER.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  const row = page.getByRole('list', { name: 'Wall of pumps' }).getByRole('listitem').filter({ hasText: serial });
  await row.waitFor();
  await page.getByText('live', { exact: true }).waitFor();
  await row.evaluate((element) => {
    const shown: { figure: string; at: number }[] = [];
    Object.assign(window, { shown });
    new MutationObserver(() => {
      const figure = /Speed rpm ([\d,]+)/.exec(element.textContent ?? '')?.[1] ?? '';
      // The frame after the change is the one in which it can be seen.
      requestAnimationFrame(() => shown.push({ figure, at: performance.timeOrigin + performance.now() }));
    }).observe(element, { subtree: true, childList: true, characterData: true });
  });
  return page;
}

/** Says a speed that was not said before, again and again, until the load is over; when each was said, by its speed. */
async function publishSpeeds(
  port: number,
  probe: DeviceLogin,
  loading: Promise<unknown>,
): Promise<ReadonlyMap<number, number>> {
  const device = await connectDevice(port, probe, () => undefined);
  const sentAt = new Map<number, number>();
  const timer = setInterval(() => {
    const rpm = 1000 + ((sentAt.size * 61) % 2900);
    const now = Date.now();
    sentAt.set(rpm, now);
    publish(device, JSON.stringify({ t: now, rpm, in: 0, act: 0, w: rpm / 5, src: 'program' }));
  }, PROBE_EVERY_MS);
  await loading;
  clearInterval(timer);
  return sentAt;
}

/** One frame shows the newest speed: those before it have been overtaken, and are on the wall as well. */
function matchLateness(sentAt: ReadonlyMap<number, number>, shown: Shown['shown']): number[] {
  const waiting = new Map(sentAt);
  const lateness: number[] = [];
  for (const { figure, at } of shown) {
    const sent = sentAt.get(Number(figure.replaceAll(',', '')));
    if (sent === undefined) continue;
    for (const [rpm, when] of waiting) {
      if (when > sent) continue;
      lateness.push(at - when);
      waiting.delete(rpm);
    }
  }
  return lateness;
}
