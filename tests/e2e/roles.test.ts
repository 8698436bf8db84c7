import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchBrowser, listAxeViolations } from '#tests/support/browser.ts';
import { isFocusVisible, tabTo } from './keyboard.ts';
import { openOwnProduct } from './own-product.ts';
import { type Desk, HOMEOWNER, MANAGER, openDesk, signIn, TECHNICIAN } from './people.ts';
import { failToPrime, type PlayedDevice, playDevice } from './played-device.ts';
import { examineScreen, waitUntilDrawn } from './screens.ts';
import { gatherTroubles } from './watched-page.ts';

/** A pump that nobody simulates: its program runs all day. The test makes it fail to prime. */
const PAD = 'Paddock View 56';
const SERIAL = 'MR-000309';
const PRIMER = { primeSeconds: 180, programRpm: 1750 };
const LOOKS_LONG_MS = 300_000;

const product = await openOwnProduct();
let browser: Browser;
let device: PlayedDevice;
let alarmPath: string;
let pumpPath: string;
let padEnergyPath: string;

beforeAll(async () => {
  [browser] = await Promise.all([launchBrowser(), product.start()]);
  device = await playDevice(product, SERIAL);
  await failToPrime(device, PRIMER);
  const { page, close } = await openAs(MANAGER);
  await page.goto('/alarms');
  const row = page.getByRole('article').filter({ hasText: PAD });
  alarmPath = await getPath(row.getByRole('link', { name: /Did not prime/ }));
  pumpPath = await getPath(row.getByRole('link', { name: PAD }));
  padEnergyPath = await findPadEnergy(page, pumpPath);
  await close();
}, 300_000);

afterAll(async () => {
  await device?.end();
  await browser?.close();
});

type Hrefs = { readonly getAttribute: (name: string) => Promise<string | null> };
const getPath = async (link: Hrefs): Promise<string> => (await link.getAttribute('href')) ?? '';

/** Where the pad of a pump has its energy: the pump's page links to it. */
async function findPadEnergy(page: Desk['page'], path: string): Promise<string> {
  await page.goto(path);
  return getPath(page.getByRole('link', { name: 'The whole pad' }));
}

/** Signed in, with everything that goes wrong in the page written down from its first moment. */
async function openAs(email: string) {
  const desk = await openDesk(browser, product.url);
  const troubles = await gatherTroubles(desk.page);
  await desk.page.goto('/');
  await signIn(desk.page, email);
  await waitUntilDrawn(desk.page);
  return { ...desk, troubles };
}

const listNavigation = ({ page }: Pick<Desk, 'page'>) =>
  page.getByRole('navigation', { name: 'Pages' }).getByRole('link').allTextContents();

describe.each([
  [
    MANAGER,
    '/fleet',
    ['Fleet', 'Alarms', 'Energy', 'Settings'],
    [
      '/fleet',
      '/fleet?range=7d',
      '/alarms',
      '/alarms/health',
      '/energy',
      'pad energy',
      '/settings/rules',
      '/settings/tariffs',
      '/settings/tariffs/new',
      'pump',
      'alarm',
    ],
  ],
  [TECHNICIAN, '/alarms', ['Alarms', 'Fleet'], ['/alarms', 'alarm', '/fleet', 'pump']],
  [HOMEOWNER, '/my-pump', ['My pump'], ['/my-pump']],
])('%s', (email, first, navigation, screens) => {
  it('lands on the first of their screens and is offered no others', async () => {
    const desk = await openAs(email);
    expect(new URL(desk.page.url()).pathname).toBe(first);
    const offered = (await listNavigation(desk)).map((text) => text.replace(/\d.*$/, '').trim());
    expect(offered).toEqual(navigation);
    await desk.close();
  });

  it(
    'finds every screen accessible, in light and dark, on a desk and on a phone, and quiet',
    async () => {
      const { page, troubles, close } = await openAs(email);
      const pathOf = (screen: string) =>
        ({ pump: pumpPath, alarm: alarmPath, 'pad energy': padEnergyPath })[screen] ?? screen;
      const faults: string[] = [];
      for (const screen of [...screens, '/profile', '/no-such-page']) {
        await page.goto(pathOf(screen));
        faults.push(...(await examineScreen(page)).map((fault) => `${screen}, ${fault}`));
      }
      expect(faults).toEqual([]);
      expect(troubles.list()).toEqual([]);
      await close();
    },
    LOOKS_LONG_MS,
  );
});

describe('a manager', () => {
  it(
    'makes a tariff that the server finds sound, gives it from a date, and takes that back',
    async () => {
      const { page, troubles, close } = await openAs(MANAGER);
      await page.goto('/settings/tariffs/new');
      await page.getByLabel('Name', { exact: true }).fill('Tarnwick flat 2027');
      await page.getByLabel('Price a kWh, Period 1, tier 1').fill('0.31456');
      await page.getByText('Every hour has a price.').waitFor();
      await page.getByRole('button', { name: 'Save', exact: true }).click();
      await page.getByRole('heading', { level: 1, name: 'Tariff: Tarnwick flat 2027' }).waitFor();
      await page.getByRole('link', { name: 'All tariffs' }).click();
      const terms = page.getByRole('region', { name: 'The company’s terms' });
      await terms.getByRole('button', { name: 'Replace from a date' }).click();
      await terms.getByLabel('Tariff', { exact: true }).last().selectOption({ label: 'Tarnwick flat 2027' });
      await terms.getByLabel('from', { exact: true }).last().fill('2990-01-01');
      await page.getByRole('button', { name: 'Save', exact: true }).click();
      await page.getByText(/^the company from .*Jan 1, 2990$/).waitFor();
      expect(await listAxeViolations(page)).toEqual([]);
      await page.getByRole('button', { name: 'Undo the last change of tariffs' }).click();
      await page.getByRole('button', { name: 'Delete Tarnwick flat 2027' }).click();
      await page.getByText('Tarnwick flat 2027 is deleted.').waitFor();
      expect(troubles.list()).toEqual([]);
      await close();
    },
    LOOKS_LONG_MS,
  );
});

describe('a homeowner', () => {
  it('sees their own pump in plain words', async () => {
    const { page, close } = await openAs(HOMEOWNER);
    await page.getByText('Today at Saltern Way 12').waitFor();
    expect(await page.getByRole('heading', { level: 1 }).textContent()).toMatch(/^(Your pump|We cannot see your pump)/);
    await close();
  });

  it(
    'is told that the fleet and the alarms are not theirs',
    async () => {
      const { page, close } = await openAs(HOMEOWNER);
      for (const path of [
        '/fleet',
        '/alarms',
        '/alarms/health',
        '/energy',
        '/settings/tariffs',
        padEnergyPath,
        alarmPath,
      ]) {
        await page.goto(path);
        await page.getByRole('heading', { level: 1, name: 'This page is not for your role.' }).waitFor();
        expect(await examineScreen(page)).toEqual([]);
      }
      await close();
    },
    LOOKS_LONG_MS,
  );

  it('finds nothing where somebody else’s pump is', async () => {
    const { page, close } = await openAs(HOMEOWNER);
    await page.goto(pumpPath);
    await page.getByText('There is no such thing here').first().waitFor();
    expect(await page.getByText(PAD).count()).toBe(0);
    await close();
  });
});

describe('a stranger', () => {
  it(
    'meets an accessible sign-in page that keeps what was typed when it says no',
    async () => {
      const { page, close } = await openDesk(browser, product.url);
      const troubles = await gatherTroubles(page);
      await page.goto('/fleet');
      await page.waitForURL('**/sign-in?to=*');
      expect(await examineScreen(page)).toEqual([]);
      // What the page asked for before it knew that nobody is signed in.
      expect(troubles.list().filter((trouble) => !/401 \(Unauthorized\)/.test(trouble))).toEqual([]);
      await page.getByLabel('E-mail address').fill(MANAGER);
      await page.getByLabel('Password').fill('not the password');
      await page.getByRole('button', { name: 'Sign in' }).click();
      await page.getByRole('alert').waitFor();
      expect(await page.getByLabel('E-mail address').inputValue()).toBe(MANAGER);
      await close();
    },
    LOOKS_LONG_MS,
  );

  it('is served every page under a policy that allows nothing from elsewhere and nothing inline', async () => {
    const answer = await fetch(`${product.url}/fleet`);
    const policy = answer.headers.get('Content-Security-Policy') ?? '';
    expect(policy).toContain("default-src 'none'");
    expect(policy).not.toMatch(/unsafe-|\*|data:|blob:/);
  });
});

describe('with nothing but a keyboard', () => {
  it('a manager signs in, skips to the wall, opens a row, and acknowledges an alarm', async () => {
    const { page, close } = await openDesk(browser, product.url);
    await page.goto('/');
    await page.getByLabel('E-mail address').waitFor();
    await tabTo(page, /^input/);
    await page.keyboard.type(MANAGER);
    await page.keyboard.press('Tab');
    await page.keyboard.type('millrace-demo');
    await page.keyboard.press('Enter');
    await page.waitForURL('**/fleet');
    await waitUntilDrawn(page);

    await page.goto('/fleet');
    await waitUntilDrawn(page);
    await tabTo(page, /Skip to the page/);
    expect(await isFocusVisible(page)).toBe(true);
    await page.keyboard.press('Enter');
    await tabTo(page, new RegExp(PAD));
    expect(await isFocusVisible(page)).toBe(true);
    await page.keyboard.press('Enter');
    await page.waitForURL(`**${pumpPath}`);
    await waitUntilDrawn(page);

    await tabTo(page, /Did not prime/);
    await page.keyboard.press('Enter');
    await page.waitForURL(`**${alarmPath}`);
    await waitUntilDrawn(page);
    await tabTo(page, /^button Acknowledge/);
    expect(await isFocusVisible(page)).toBe(true);
    await page.keyboard.press('Enter');
    await page.getByRole('status').filter({ hasText: 'Acknowledged' }).waitFor();
    await page
      .getByText(/acknowledged by/)
      .first()
      .waitFor();
    await close();
  });
});
