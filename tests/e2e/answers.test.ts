import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchBrowser } from '#tests/support/browser.ts';
import { getAlarmLink, waitForMail } from './caught-mail.ts';
import { openOwnProduct } from './own-product.ts';
import { type Desk, MANAGER, openSignedIn, TECHNICIAN } from './people.ts';
import { failToPrime, type PlayedDevice, playDevice } from './played-device.ts';
import { examineScreen } from './screens.ts';

/** A pump that nobody simulates, on another technician's route. */
const PAD = 'Thornapple Gate 11';
const SERIAL = 'MR-000312';
const PRIMER = { primeSeconds: 200, programRpm: 1700 };
const LOOKS_LONG_MS = 300_000;

const product = await openOwnProduct();
let browser: Browser;
let device: PlayedDevice;
let manager: Desk;
let technician: Desk;
let alarmUrl: string;

const rowOf = ({ page }: Desk) => page.getByRole('article').filter({ hasText: PAD });

beforeAll(async () => {
  [browser] = await Promise.all([launchBrowser(), product.start()]);
  device = await playDevice(product, SERIAL);
  await failToPrime(device, PRIMER);
  manager = await openSignedIn(browser, product.url, MANAGER);
  await manager.page.goto('/alarms');
  await rowOf(manager).waitFor();
  technician = await openSignedIn(browser, product.url, TECHNICIAN);
  await technician.page.goto('/alarms?whose=mine');
}, 300_000);

afterAll(async () => {
  await device?.end();
  await browser?.close();
});

describe('an alarm of another route', () => {
  it('is given to a technician, who has a mail with its likely causes and sees it come', async () => {
    await technician.page.getByRole('heading', { level: 1 }).waitFor();
    expect(await rowOf(technician).count()).toBe(0);
    const row = rowOf(manager);
    await row.getByRole('button', { name: /^More/ }).click();
    await row.getByRole('button', { name: /^Give to/ }).click();
    const dialog = manager.page.getByRole('dialog');
    await dialog.getByLabel(/Joss Aldane/).check();
    await dialog.getByRole('button', { name: 'Give', exact: true }).click();
    await row.getByText(/goes to Joss Aldane/).waitFor();
    await rowOf(technician).waitFor();
    const mail = await waitForMail(
      product.mailUrl,
      ({ to, subject }) => to.includes(TECHNICIAN) && subject.includes(PAD),
      60_000,
    );
    expect(mail.text).toContain('This was given to you.');
    expect(mail.text).toMatch(/(Likely|Possible) causes/);
    expect(mail.html).toMatch(/(Likely|Possible) causes/);
    alarmUrl = getAlarmLink(mail);
  });

  it('is held on a phone, and leaves the manager’s open page for the list of holds', async () => {
    const { page } = technician;
    await page.setViewportSize({ width: 390, height: 844 });
    await page.goto(alarmUrl);
    await page.getByRole('button', { name: /^Hold until/ }).click();
    const dialog = page.getByRole('dialog', { name: 'Hold until' });
    await dialog.getByLabel('In an hour').check();
    await dialog.getByLabel('Why').fill('on the way with a lid ring');
    await dialog.getByRole('button', { name: 'Hold', exact: true }).click();
    await page
      .getByText(/on hold until .* by Joss Aldane: on the way with a lid ring/)
      .first()
      .waitFor();
    await rowOf(manager).waitFor({ state: 'detached' });
    await manager.page.getByRole('button', { name: /^On hold \d/ }).click();
    await rowOf(manager)
      .getByText(/on the way with a lid ring/)
      .waitFor();
  });

  it('is let go by the manager, answered “nothing to do”, and has all of it in its history', async () => {
    await rowOf(manager)
      .getByRole('button', { name: /^End the hold/ })
      .click();
    const { page } = technician;
    await page
      .getByText(/on hold until/)
      .first()
      .waitFor({ state: 'detached' });
    await page.getByRole('button', { name: /^Nothing to do/ }).click();
    await page.getByRole('dialog').getByRole('textbox').fill('bled by the owner');
    await page.getByRole('dialog').getByRole('button', { name: 'Nothing to do', exact: true }).click();
    const history = page.getByRole('region', { name: 'What happened to it' });
    await history.getByText('nothing to do, by Joss Aldane').waitFor();
    for (const step of [
      'hold over, by Ilse Ravn',
      'put on hold, by Joss Aldane',
      'given away, by Ilse Ravn',
      'bled by the owner',
    ])
      await history.getByText(step).waitFor();
  });

  it(
    'and its list as a table are accessible in every view',
    async () => {
      await manager.page.goto('/alarms?view=table');
      expect(await examineScreen(manager.page)).toEqual([]);
      await manager.page.goto(alarmUrl);
      expect(await examineScreen(manager.page)).toEqual([]);
    },
    LOOKS_LONG_MS,
  );
});
