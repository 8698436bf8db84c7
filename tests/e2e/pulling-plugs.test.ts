import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { waitUntil } from '#server/bootstrap/process-table.mjs';
import type { FleetPage } from '#shared/contract/http/pumps.ts';
import { launchBrowser } from '#tests/support/browser.ts';
import { listMails, waitForMail } from './caught-mail.ts';
import { takeMailServerAway } from './outage.ts';
import { type Desk, MANAGER, openSignedIn } from './people.ts';
import { failToPrime, type PlayedDevice, playDevice } from './played-device.ts';
import { openProduct } from './product.ts';
import { waitUntilDrawn } from './screens.ts';

/** Pumps that nobody simulates, each for one thing. */
const UNMAILED = { serial: 'MR-000206', pad: 'Pebble Drive 90', primeSeconds: 150, programRpm: 1450 };
const BACK_WITHIN_MS = 120_000;
const _DAY_MS = 86_400_000;

const product = openProduct(inject('productPlace'));
const devices: PlayedDevice[] = [];
let browser: Browser;
let manager: Desk;

beforeAll(async () => {
  [browser] = await Promise.all([launchBrowser(), product.start()]);
  manager = await openSignedIn(browser, product.url, MANAGER);
}, 300_000);

afterAll(async () => {
  for (const device of devices) await device.end();
  await browser?.close();
});

async function play(serial: string): Promise<PlayedDevice> {
  const device = await playDevice(product, serial);
  devices.push(device);
  return device;
}

async function ask<Answer>(path: string): Promise<Answer> {
  const answer = await manager.context.request.get(path);
  expect(answer.status(), path).toBe(200);
  return answer.json() as Promise<Answer>;
}

async function openPage(path: string): Promise<Page> {
  const page = await manager.context.newPage();
  await page.goto(path);
  await waitUntilDrawn(page);
  return page;
}

const live = (page: Page) => page.getByText('live', { exact: true });
const _findPumpId = async (pad: string) => {
  const { items } = await ask<FleetPage>(`/api/pumps?q=${encodeURIComponent(pad)}`);
  return items[0]?.pumpId ?? '';
};
describe('the mail server, when it is killed', () => {
  it('holds back no alarm, and gets the mail once it is back', async () => {
    const page = await openPage('/alarms');
    await live(page).waitFor();
    const outage = await takeMailServerAway(product);
    const device = await play(UNMAILED.serial);
    await failToPrime(device, UNMAILED);
    await page.getByRole('article').filter({ hasText: UNMAILED.pad }).getByText('Did not prime').first().waitFor();
    expect(await waitUntil(() => outage.tries() > 0, BACK_WITHIN_MS)).toBe(true);
    await outage.end();
    const fits = ({ subject }: { subject: string }) => subject.includes(UNMAILED.pad);
    await waitForMail(product.mailUrl, fits, BACK_WITHIN_MS);
    expect((await listMails(product.mailUrl)).filter(fits)).toHaveLength(1);
    await page.close();
  }, 300_000);
});
