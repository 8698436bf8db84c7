import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { waitUntil } from '#server/bootstrap/process-table.mjs';
import type { AlarmPage } from '#shared/contract/http/alarms.ts';
import type { FleetPage, ReadingSeries } from '#shared/contract/http/pumps.ts';
import type { Run } from '#shared/contract/http/runs.ts';
import { launchBrowser } from '#tests/support/browser.ts';
import { listMails, waitForMail } from './caught-mail.ts';
import { killChild, takeDatabaseAway, takeMailServerAway } from './outage.ts';
import { openOwnProduct } from './own-product.ts';
import { type Desk, MANAGER, openSignedIn } from './people.ts';
import { failToPrime, type PlayedDevice, playDevice } from './played-device.ts';
import { waitUntilDrawn } from './screens.ts';
import { HELD_TICKS, type Said, type Ticking, tick } from './ticking.ts';

/** Pumps that nobody simulates, each for one thing. */
const UNMAILED = { serial: 'MR-000206', pad: 'Pebble Drive 90', primeSeconds: 150, programRpm: 1450 };
const MISSED = { serial: 'MR-000308', pad: 'Windmill Yard 1', primeSeconds: 240, programRpm: 1250 };
const TICKING = { serial: 'MR-000302', pad: 'Cistern Lane 29' };
const BACK_WITHIN_MS = 120_000;
const DAY_MS = 86_400_000;

const product = await openOwnProduct();
const devices: PlayedDevice[] = [];
const tickings: Ticking[] = [];
let browser: Browser;
let manager: Desk;

beforeAll(async () => {
  [browser] = await Promise.all([launchBrowser(), product.start()]);
  manager = await openSignedIn(browser, product.url, MANAGER);
}, 300_000);

// A device that went on speaking after its test, passed or failed, would be heard in the next one.
afterEach(async () => {
  for (const ticking of tickings.splice(0)) ticking.stop();
  for (const device of devices.splice(0)) await device.end();
});

afterAll(() => browser?.close());

async function play(serial: string): Promise<PlayedDevice> {
  const device = await playDevice(product, serial);
  devices.push(device);
  return device;
}

function startTicking(device: PlayedDevice): Ticking {
  const ticking = tick(device);
  tickings.push(ticking);
  return ticking;
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
const findPumpId = async (pad: string) => {
  const { items } = await ask<FleetPage>(`/api/pumps?q=${encodeURIComponent(pad)}`);
  return items[0]?.pumpId ?? '';
};
const figure = (rpm: number) => rpm.toLocaleString('en-US');

/** Everything that was said is stored, and stored once; where the series breaks off it has no speed. */
async function expectStored(pumpId: string, said: readonly Said[]): Promise<void> {
  const [from, until] = [said[0]?.t ?? 0, (said.at(-1)?.t ?? 0) + 1];
  const series = await ask<ReadingSeries>(`/api/pumps/${pumpId}/readings?from=${from}&until=${until}&width=4000`);
  expect(series.bucketMs).toBe(0);
  expect(series.t.map((t, place) => ({ t, rpm: series.rpm[place] })).filter(({ rpm }) => rpm !== null)).toEqual(said);
}

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

describe('the database, when it is killed', () => {
  it('leaves a page that says it is not live, keeps its picture, and recovers by itself', async () => {
    const device = await play(TICKING.serial);
    const pumpId = await findPumpId(TICKING.pad);
    const page = await openPage(`/fleet?q=${encodeURIComponent(TICKING.pad)}`);
    const row = page.getByRole('listitem').filter({ hasText: TICKING.pad });
    const ticking = startTicking(device);
    await row.getByText(/1,5\d\d|2,1\d\d/).waitFor();
    const outage = await takeDatabaseAway(product);
    await page
      .getByText(/last heard|not live/)
      .first()
      .waitFor();
    expect(await row.isVisible()).toBe(true);
    await outage.end();
    await live(page).waitFor({ timeout: BACK_WITHIN_MS });
    const said = await ticking.settle();
    await row.getByText(figure(ticking.lastRpm())).waitFor();
    await expectStored(pumpId, said);
    await page.close();
  }, 400_000);
});

describe('the server process, when it is killed', () => {
  /** The runs' table of a pump's page: when each began, what commanded it, how fast. */
  const readRuns = async (page: Page): Promise<string[]> => {
    const rows = await page
      .getByRole('table', { name: /^Runs of/ })
      .getByRole('row')
      .all();
    const cells = await Promise.all(rows.slice(1).map((row) => row.getByRole('cell').allTextContents()));
    return cells.map((row) => [row[0], row[3], row[4]].join(' '));
  };
  const openRuns = async (pumpId: string): Promise<Page> => {
    const page = await openPage(`/pumps/${pumpId}`);
    await page
      .getByText(/^Runs of .* as a table$/)
      .first()
      .click();
    await page.getByRole('table', { name: /^Runs of/ }).waitFor();
    return page;
  };
  const readAlarmIds = async (page: Page): Promise<string[]> => {
    const links = await page.getByRole('article').getByRole('heading').getByRole('link').all();
    const paths = await Promise.all(links.map((link) => link.getAttribute('href')));
    return paths.map((path) => path?.split('/').at(-1) ?? '').sort();
  };

  it('is started again, and the open pages miss nothing of what happened meanwhile', async () => {
    const [ticker, other] = [await play(TICKING.serial), await play(MISSED.serial)];
    const pumpId = await findPumpId(TICKING.pad);
    const began = Date.now();
    const ticking = startTicking(ticker);
    const [runs, alarms] = [await openRuns(pumpId), await openPage('/alarms')];
    await Promise.all([live(runs).waitFor(), live(alarms).waitFor()]);

    const killed = await killChild(product, 'node');
    const told = failToPrime(other, MISSED);
    await runs
      .getByText(/not live/)
      .first()
      .waitFor();
    expect(await waitUntil(() => (product.findChildPid('node') ?? killed) !== killed, BACK_WITHIN_MS)).toBe(true);
    await Promise.all([live(runs), live(alarms)].map((text) => text.waitFor({ timeout: BACK_WITHIN_MS })));
    await told;
    // Runs before, during and after.
    const turns = ticking.turns() + 2;
    expect(await waitUntil(() => ticking.turns() >= turns, BACK_WITHIN_MS)).toBe(true);
    const said = await ticking.settle();
    await expectStored(pumpId, said);

    await alarms.getByRole('article').filter({ hasText: MISSED.pad }).first().waitFor();
    const open = await ask<AlarmPage>('/api/alarms?alarmClass=alarm&show=open');
    expect(await readAlarmIds(alarms)).toEqual(open.items.map(({ id }) => id).sort());

    // Stored is not yet understood: every turn is a run once the last of them is. What the pump did before may go on
    // in the first.
    const secondTurn = said[HELD_TICKS]?.t ?? 0;
    const window = `from=${began - DAY_MS}&until=${Date.now() + DAY_MS}`;
    const listKept = async () => (await ask<{ runs: Run[] }>(`/api/pumps/${pumpId}/runs?${window}`)).runs;
    const countNew = async () => (await listKept()).filter(({ from }) => from >= secondTurn).length;
    await expect.poll(countNew, { timeout: BACK_WITHIN_MS, interval: 500 }).toBe(ticking.turns() - 1);
    const kept = await listKept();
    const fresh = await openRuns(pumpId);
    const isAlike = async () => JSON.stringify(await readRuns(runs)) === JSON.stringify(await readRuns(fresh));
    await waitUntil(isAlike, BACK_WITHIN_MS);
    expect(await readRuns(runs)).toEqual(await readRuns(fresh));
    expect(await readRuns(runs)).toHaveLength(kept.length);
  }, 400_000);
});
