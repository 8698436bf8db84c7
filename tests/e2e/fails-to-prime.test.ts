import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchBrowser } from '#tests/support/browser.ts';
import { getAlarmLink, listMails, type MailWords, waitForMail } from './caught-mail.ts';
import { openOwnProduct } from './own-product.ts';
import { type Desk, MANAGER, openDesk, openSignedIn, signIn, TECHNICIAN } from './people.ts';

/** The demo pump whose lid was not seated after the basket was cleaned: its script begins with the fleet. */
const PAD = 'Tern Court 4';
/** Two tries of half a minute, their pauses, and a machine that has other work. */
const RAISED_WITHIN_MS = 180_000;
const TITLE = /Did not prime/;

const product = await openOwnProduct();
let browser: Browser;
let manager: Desk;
let technician: Desk;
let mail: MailWords;

const wallOf = ({ page }: Desk) => page.getByRole('list', { name: 'Wall of pumps' });
const rowOn = (desk: Desk) =>
  wallOf(desk)
    .getByRole('listitem')
    .filter({ has: desk.page.getByRole('link', { name: PAD }) });

beforeAll(async () => {
  [browser] = await Promise.all([launchBrowser(), product.start()]);
}, 300_000);

afterAll(async () => {
  await browser?.close();
});

describe('a pump that fails to prime', () => {
  it('belongs to a manager who signs in and leaves the wall open', async () => {
    manager = await openSignedIn(browser, product.url, MANAGER);
    await manager.page.waitForURL('**/fleet');
    await manager.page.getByText('live', { exact: true }).waitFor();
    await wallOf(manager).waitFor();
    await manager.page.getByRole('link', { name: /^Alarms$/ }).waitFor();
    // A page that is loaded again would not have it any more.
    await manager.page.evaluate(() => Object.assign(window, { neverLeft: true }));
  });

  it('comes to the top of that wall with its alarm, by itself', async () => {
    await rowOn(manager).getByText(TITLE).waitFor({ timeout: RAISED_WITHIN_MS });
    expect(await wallOf(manager).getByRole('listitem').first().textContent()).toContain(PAD);
    await rowOn(manager).getByRole('img', { name: 'urgent, unacknowledged' }).waitFor();
    await manager.page.getByRole('link', { name: /Alarms 1 unacknowledged/ }).waitFor();
  }, 200_000);

  it('has its technician written a mail that says what, where, since when and what to look at first', async () => {
    const fits = ({ to, subject }: { to: readonly string[]; subject: string }) =>
      to.includes(TECHNICIAN) && TITLE.test(subject);
    mail = await waitForMail(product.mailUrl, fits, 60_000);
    expect(mail.subject).toContain(PAD);
    expect(mail.subject).toMatch(/^Urgent: /);
    expect(mail.text).toMatch(/Since: +\S/);
    expect(mail.text).toMatch(/Look at first\n1\. Lid and O-ring/);
    expect(mail.html).toContain(getAlarmLink(mail));
    expect((await listMails(product.mailUrl)).filter(fits)).toHaveLength(1);
  });

  it('is opened by the link in it: sign-in first, then that very alarm', async () => {
    technician = await openDesk(browser, product.url);
    const { page } = technician;
    await page.goto(getAlarmLink(mail));
    await page.waitForURL('**/sign-in?*');
    await signIn(page, TECHNICIAN);
    await page.waitForURL(getAlarmLink(mail));
    await page.getByRole('heading', { level: 1, name: PAD }).waitFor();
    await page.getByText(TITLE).first().waitFor();
  });

  it('shows the acknowledgement on the manager’s open page, which was never loaded again', async () => {
    const { page } = technician;
    await page.getByRole('button', { name: /^Acknowledge/ }).click();
    await page.getByRole('status').filter({ hasText: 'Acknowledged' }).waitFor();
    await rowOn(manager).getByRole('img', { name: 'urgent', exact: true }).waitFor();
    await manager.page.getByRole('link', { name: /^Alarms$/ }).waitFor();
    expect(await manager.page.evaluate(() => 'neverLeft' in window)).toBe(true);
  });
});

describe('the product', () => {
  it('leaves nothing running when it is stopped', async () => {
    await manager.close();
    await technician.close();
    await product.stop();
    expect(product.output()).toMatch(/Stopping PostgreSQL\s*$/);
    expect(await product.listRemains()).toEqual([]);
  });

  it('goes on where it left when it is started again', async () => {
    await product.start();
    manager = await openSignedIn(browser, product.url, MANAGER);
    await manager.page.goto(getAlarmLink(mail));
    await manager.page
      .getByText(/acknowledged by Joss Aldane/)
      .first()
      .waitFor();
    await manager.close();
  }, 300_000);
});
