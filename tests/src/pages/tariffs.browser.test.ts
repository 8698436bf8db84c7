import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { fakeId } from '#tests/src/fake-api/fake-id.ts';
import type { FakeState } from '#tests/src/fake-api/fake-state.ts';
import { listAxeViolations } from '#tests/support/browser.ts';
import { createPageBench, eventually } from './page-bench.ts';

const bench = createPageBench();
const LIST = '/settings/tariffs';
const TIERS = `${LIST}/${fakeId('tariff', 1)}`;
const asManager = { role: 'manager' } as const;

const grid = (page: Page, days = 'Monday to Friday') =>
  page.getByRole('grid', { name: `Energy, ${days}: months by hours` });
const hourOf = (page: Page, month: string, hours: string) =>
  grid(page).getByRole('gridcell', { name: new RegExp(`^${month}, ${hours}: `) });
const stored = (state: FakeState, name: string) => state.tariffs.rows.find(({ tariff }) => tariff.name === name);
const save = (page: Page) => page.getByRole('button', { name: 'Save', exact: true });
const undo = (page: Page) => page.getByRole('button', { name: 'Undo the last change of tariffs' });
const SHIFT_STEPS = (key: string, count: number) => Array.from({ length: count }, () => `Shift+${key}`);

describe('the list of tariffs', () => {
  it('says who goes by each, copies one, deletes one that nobody goes by, and brings it back', async () => {
    const { page, state } = await bench.open(LIST, asManager);
    const rows = page.getByRole('region', { name: 'Tariffs' }).getByRole('row');
    await rows.filter({ hasText: 'Tarnwick by the hour' }).filter({ hasText: 'the company' }).waitFor();
    await rows.filter({ hasText: 'Tarnwick tiers' }).filter({ hasText: '$0.10 to $0.25' }).waitFor();
    expect(await page.getByRole('button', { name: 'Delete Tarnwick by the hour' }).count()).toBe(0);
    await page.getByRole('button', { name: 'Delete Tarnwick tiers' }).click();
    await undo(page).click();
    await page.getByText('Tarnwick tiers is back.').waitFor();
    expect(stored(state, 'Tarnwick tiers')?.tariff.energy.periods[0]).toHaveLength(2);
    await page.getByRole('link', { name: 'Copy Tarnwick by the hour' }).click();
    await page.getByRole('heading', { level: 1, name: 'New tariff' }).waitFor();
    expect(await page.getByLabel('Name', { exact: true }).inputValue()).toBe('Tarnwick by the hour (copy)');
    await save(page).click();
    await page.getByRole('heading', { level: 1, name: 'Tariff: Tarnwick by the hour (copy)' }).waitFor();
    expect(stored(state, 'Tarnwick by the hour (copy)')?.tariff.energy).toEqual(
      stored(state, 'Tarnwick by the hour')?.tariff.energy,
    );
  });

  it('says what to do where there is none, and what went wrong where it cannot be read', async () => {
    const { page } = await bench.open(LIST, {
      ...asManager,
      prepare: (state) => Object.assign(state.tariffs, { rows: [], plans: new Map() }),
    });
    await page.getByText('There is no tariff yet.').waitFor();
    await page.getByText('No tariff holds yet: energy has no cost.').waitFor();
    const failing = await bench.open(LIST, {
      ...asManager,
      prepare: (state) => state.failures.set('/api/tariffs', 'unavailable'),
    });
    await failing.page.getByRole('alert').waitFor();
    failing.state.failures.clear();
    await failing.page.getByRole('button', { name: 'Try again' }).click();
    await failing.page.getByRole('link', { name: 'Tarnwick tiers', exact: true }).waitFor();
  });

  it('is not for a technician', async () => {
    const { page } = await bench.open(LIST, { role: 'technician' });
    await page.getByText('This page is not for your role.').waitFor();
  });
});

describe('which tariff holds', () => {
  it('is replaced from a date for the company, with the way back', async () => {
    const { page, state } = await bench.open(LIST, asManager);
    const terms = page.getByRole('region', { name: 'The company’s terms' });
    await terms.getByRole('button', { name: 'Replace from a date' }).click();
    await terms.getByLabel('from', { exact: true }).nth(1).fill('2023-05-01');
    await terms.getByText('Choose a day after Mon, Jan 1, 2024', { exact: false }).waitFor();
    expect(await save(page).isDisabled()).toBe(true);
    await terms.getByLabel('from', { exact: true }).nth(1).fill('2027-01-01');
    await save(page).click();
    await page.getByText('Saved. The worker is pricing what it changes.').waitFor();
    expect(state.tariffs.plans.get('company')?.terms).toEqual([
      { tariffId: fakeId('tariff', 2), from: '2024-01-01', to: '2027-01-01' },
      { tariffId: fakeId('tariff', 1), from: '2027-01-01', to: null },
    ]);
    await page.getByText('the company from Fri, Jan 1, 2027').waitFor();
    await undo(page).click();
    await page.getByText('It is as it was.').waitFor();
    expect(state.tariffs.plans.get('company')?.terms).toHaveLength(1);
  });

  it('is a pad’s own where one is found and given it', async () => {
    const { page, state } = await bench.open(LIST, asManager);
    const pads = page.locator('#pads');
    await pads.getByText('Every pad goes by the company’s terms.').waitFor();
    await pads.getByRole('searchbox').fill('Tern Court 4');
    await pads.getByRole('button', { name: 'Tern Court 4' }).click();
    await pads.getByRole('button', { name: 'Give it its own terms' }).click();
    await pads
      .getByLabel('All of it, kWh a month')
      .or(pads.getByLabel(/kWh a month|Period 1/))
      .first()
      .fill('300');
    await save(page).click();
    await page.getByText('Saved. The worker is pricing what it changes.').waitFor();
    const [plan] = [...state.tariffs.plans].filter(([key]) => key !== 'company').map(([, own]) => own);
    expect(plan).toMatchObject({ otherKwhByPeriod: [300], terms: [{ tariffId: fakeId('tariff', 1), to: null }] });
    await page.getByText('1 pad of its own terms').waitFor();
    await pads.getByRole('button', { name: 'Back to the company’s terms' }).click();
    await save(page).click();
    await eventually(() => pads.getByText('Every pad goes by the company’s terms.').count()).toBe(1);
  });

  it('has the carbon of its grid beside it, with the year', async () => {
    const { page, state } = await bench.open(LIST, asManager);
    await page.getByText('Used: 0.350 kg a kWh, of 2023').waitFor();
    await page.getByLabel('Grid').selectOption('');
    await eventually(() => state.tariffs.carbon.region).toBe(null);
    await undo(page).click();
    await eventually(() => state.tariffs.carbon.region).toBe('US');
  });
});

describe('a tariff’s form', () => {
  it('is filled by keyboard alone, named a hole, and saved once every hour has a price', async () => {
    const { page, state } = await bench.open(`${LIST}/new`, asManager);
    await page.getByLabel('Name', { exact: true }).fill('By keyboard');
    await page.getByLabel('Price a kWh, Period 1, tier 1').fill('0.19');
    await page.getByRole('button', { name: 'Add a period' }).press('Enter');
    await page.getByLabel('Name of period 2').fill('Peak');
    await page.getByLabel('Price a kWh, Peak, tier 1').fill('.48');
    await hourOf(page, 'January', 'midnight to 1 AM').focus();
    for (const key of [
      'ArrowDown',
      'ArrowDown',
      'ArrowDown',
      'ArrowDown',
      'ArrowDown',
      'End',
      'ArrowLeft',
      'ArrowLeft',
      'ArrowLeft',
    ])
      await page.keyboard.press(key);
    for (const key of [...SHIFT_STEPS('ArrowLeft', 4), ...SHIFT_STEPS('ArrowDown', 3)]) await page.keyboard.press(key);
    await page.keyboard.press('2');
    await page.getByText(/^June – September, 4\sPM to 9\sPM: Peak$/).waitFor();
    await page.getByRole('button', { name: 'Remove Peak' }).click();
    await page.getByText('Monday to Friday, June – September, 4 PM to 9 PM has no period.').first().waitFor();
    expect(await save(page).isDisabled()).toBe(true);
    await page.getByRole('button', { name: 'Undo', exact: true }).click();
    await page.getByText('Every hour has a price.').waitFor();
    await save(page).click();
    await page.getByRole('heading', { level: 1, name: 'Tariff: By keyboard' }).waitFor();
    const { energy, periodNames } = stored(state, 'By keyboard')!.tariff;
    expect(periodNames).toEqual(['', 'Peak']);
    expect(energy.weekday.map((hours) => hours.filter((period) => period === 1).length)).toEqual([
      0, 0, 0, 0, 0, 5, 5, 5, 5, 0, 0, 0,
    ]);
    expect(energy.weekend.flat().includes(1)).toBe(false);
  });

  it('is drawn on with the pointer, and filled by words', async () => {
    const { page, state } = await bench.open(TIERS, asManager);
    await page.getByRole('button', { name: 'Add a period' }).click();
    await page.getByLabel('Price a kWh, Period 2, tier 1').fill('0.4');
    await hourOf(page, 'March', '7 AM to 8 AM').hover();
    await page.mouse.down();
    await hourOf(page, 'April', '9 AM to 10 AM').hover();
    await page.mouse.up();
    await page.getByText('The hours as a list').click();
    await page.getByLabel('Days').selectOption('weekend');
    await page.getByLabel('Period', { exact: true }).selectOption('1');
    await page.getByRole('button', { name: 'Fill these hours' }).click();
    const list = page.getByRole('region', { name: 'The hours as a list' });
    await list.getByRole('row').filter({ hasText: 'March – April' }).filter({ hasText: 'Period 2' }).waitFor();
    await list
      .getByRole('row')
      .filter({ hasText: 'Saturday and Sunday' })
      .filter({ hasText: 'June – September' })
      .first()
      .waitFor();
    await save(page).click();
    await eventually(() => stored(state, 'Tarnwick tiers')?.version).toBe(2);
    const { energy } = stored(state, 'Tarnwick tiers')!.tariff;
    expect(energy.weekday[2]!.map((period, hour) => (period === 1 ? hour : -1)).filter((hour) => hour >= 0)).toEqual([
      7, 8, 9,
    ]);
    expect(energy.weekend[6]![17]).toBe(1);
    await undo(page).click();
    await eventually(() => stored(state, 'Tarnwick tiers')?.tariff.energy.periods.length).toBe(1);
  });

  it('keeps what was typed when somebody else saves first, and says so; then saves over it', async () => {
    const { page, state } = await bench.open(TIERS, asManager);
    await page.getByLabel('Fixed charge a month').fill('14');
    const row = stored(state, 'Tarnwick tiers')!;
    state.tariffs.rows = state.tariffs.rows.map((each) => (each.id === row.id ? { ...row, version: 9 } : each));
    await save(page).click();
    await page.getByText('Somebody changed this meanwhile.', { exact: false }).waitFor();
    expect(await page.getByLabel('Fixed charge a month').inputValue()).toBe('14');
    await save(page).click();
    await eventually(() => stored(state, 'Tarnwick tiers')?.version).toBe(10);
  });

  it('says at the name that another tariff has it', async () => {
    const { page } = await bench.open(TIERS, asManager);
    await page.getByLabel('Name', { exact: true }).fill('Tarnwick by the hour');
    await save(page).click();
    await page.getByText('Another tariff has this name. Choose another.').first().waitFor();
  });

  it('holds whoever leaves with changes, and lets go of them', async () => {
    const { page } = await bench.open(TIERS, asManager);
    await page.getByLabel('Fixed charge a month').fill('15');
    await page.getByRole('link', { name: 'All tariffs' }).click();
    await page.getByRole('button', { name: 'Stay' }).click();
    expect(await page.getByLabel('Fixed charge a month').inputValue()).toBe('15');
    await page.getByRole('link', { name: 'All tariffs' }).click();
    await page.getByRole('button', { name: 'Leave without them' }).click();
    await page.getByRole('heading', { level: 1, name: 'Tariffs' }).waitFor();
  });

  it('is not there for a tariff that is not', async () => {
    const { page } = await bench.open(`${LIST}/${fakeId('tariff', 77)}`, asManager);
    await page.getByRole('alert').waitFor();
  });
});

describe.each([
  [LIST, 'Pads with terms of their own'],
  [TIERS, 'Fill with'],
])('%s', (path, ready) => {
  it.each([
    ['light', 1280],
    ['dark', 1280],
    ['light', 320],
  ] as const)('has nothing that axe finds wrong by WCAG 2.2 AA, %s at %i px', async (theme, width) => {
    const { page } = await bench.open(path, { ...asManager, theme, width });
    await page.getByText(ready).first().waitFor();
    await page.waitForLoadState('networkidle');
    if (path === TIERS) await page.getByText('The hours as a list').click();
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(width);
    expect(await listAxeViolations(page)).toEqual([]);
  });
});
