import { readFile } from 'node:fs/promises';
import { describe, expect, it } from 'vitest';
import { fakeId } from '#tests/src/fake-api/fake-id.ts';
import { createPageBench, eventually } from './page-bench.ts';

const bench = createPageBench();
const NOVEMBER = '/energy?month=2026-11';
const withoutMoney = (state: { energy: { money: boolean } }) => {
  state.energy.money = false;
};

describe('the energy page', () => {
  it('states the month as a fact, with what keeps the sums from being whole', async () => {
    const { page } = await bench.open(NOVEMBER, { role: 'manager' });
    await page
      .getByRole('heading', { level: 1, name: /^November 2026 used [\d,]+ kWh and cost \$[\d,.]+\.$/ })
      .waitFor();
    await page.getByText('The figures of 2 pumps are being worked out anew.', { exact: false }).waitFor();
    await page.getByText('35 of 36 pumps have a tariff', { exact: false }).waitFor();
    await page.getByText('± $63.20').first().waitFor();
  });

  it('opens at the last whole month while the present one has only begun, and goes on by links, none into the future', async () => {
    const { page } = await bench.open('/energy', { role: 'manager' });
    await page.getByRole('heading', { level: 1, name: /^November 2026 used/ }).waitFor();
    const months = page.getByRole('navigation', { name: 'Which month' });
    await months.getByRole('link', { name: 'Dec 2026 so far ›' }).click();
    await page.getByRole('heading', { level: 1, name: /^December 2026 has used/ }).waitFor();
    expect(new URL(page.url()).search).toBe('?month=2026-12');
    expect(await months.getByRole('link').allTextContents()).toEqual(['‹ Nov 2026']);
    await months.getByRole('link').click();
    await page.getByRole('heading', { level: 1, name: /^November 2026/ }).waitFor();
    expect(new URL(page.url()).search).toBe('');
  });

  it('says under the pointer what an hour used and cost, and has the hours as a table', async () => {
    const { page } = await bench.open(NOVEMBER, { role: 'manager' });
    const hours = page.getByRole('img', { name: 'Energy by day and hour in November 2026' });
    const box = (await hours.boundingBox())!;
    await hours.hover({ position: { x: box.width - 10, y: box.height - 6 } });
    await page.getByText('Sat, Nov 28, 11\u00a0PM–midnight: 0.01 kWh').waitFor();
    await hours.hover({ position: { x: 72 + ((box.width - 72) / 24) * 17.5, y: 30 } });
    await page.getByText('Monday to Friday, 5\u00a0PM–6\u00a0PM: $0.42 a kWh').waitFor();
    await page.getByText('The hours as a table').click();
    const table = page.getByRole('region', { name: 'The hours as a table' }).getByRole('table');
    expect(await table.getByRole('row').count()).toBe(29);
  });

  it('lists pads in the order the address names, finds one, and leads to its page', async () => {
    const { page, state } = await bench.open('/energy?month=2026-11&sort=rise', { role: 'manager' });
    const pads = page.getByRole('region', { name: 'Pad by pad' }).first();
    await pads.getByRole('link', { name: 'Tern Court 4' }).waitFor();
    expect(state.calls.some((call) => call.startsWith('GET /api/energy/pads?month=2026-11&sort=rise'))).toBe(true);
    await pads.getByRole('searchbox').fill('quarry');
    await eventually(() => pads.getByRole('row').count()).toBe(2);
    await pads.getByRole('link', { name: 'Quarry Lane 18' }).click();
    await page.getByRole('heading', { level: 1, name: /^Quarry Lane 18: November 2026 used/ }).waitFor();
    await page.getByRole('link', { name: 'Filter pump' }).waitFor();
  });

  it('saves every pad, not only those read so far', async () => {
    const { page } = await bench.open(NOVEMBER, { role: 'manager', size: 120 });
    const pads = page.getByRole('region', { name: 'Pad by pad' }).first();
    await pads.getByRole('button', { name: 'Show more' }).waitFor();
    const download = page.waitForEvent('download');
    await pads.getByRole('button', { name: 'Save as CSV' }).click();
    const text = await readFile(await (await download).path(), 'utf8');
    const shown = Number((await pads.getByRole('status').textContent())?.match(/\d+/)?.[0]);
    expect(shown).toBeGreaterThan(50);
    expect(text.trimEnd().split('\r\n')).toHaveLength(shown + 1);
  });

  it('compares a costly program with what would do the same for less, on strips and in figures', async () => {
    const { page } = await bench.open(NOVEMBER, { role: 'manager' });
    const card = page.getByRole('article').filter({ hasText: 'Tern Court 4' });
    await card.getByText('The same for $31.20 a month less, 41 % of its cost.').waitFor();
    await card.getByText('Entry 1 of the program runs at a dear price in Jun–Aug, Dec', { exact: false }).waitFor();
    await card.getByRole('img', { name: 'Now: every day of Tern Court 4, Filter pump' }).waitFor();
    await card.getByRole('img', { name: 'Instead: every day of Tern Court 4, Filter pump' }).waitFor();
    await card.getByText('The weeks as tables').click();
    expect(await card.getByRole('table').filter({ hasText: 'Commanded by' }).first().textContent()).toContain(
      'Input 1',
    );
    await page.getByText('Millrace never changes a program or a clock', { exact: false }).waitFor();
  });

  it('shows energy alone where nobody has said what a kWh costs', async () => {
    const { page } = await bench.open(NOVEMBER, { role: 'manager', prepare: withoutMoney });
    await page.getByRole('heading', { level: 1, name: /^November 2026 used [\d,]+ kWh\.$/ }).waitFor();
    await page.getByText('No pad has a tariff on record yet', { exact: false }).waitFor();
    await page.getByText('Without a tariff there are no periods.').waitFor();
    expect(await page.getByText('$').count()).toBe(0);
  });

  it('keeps what came when a part of it fails, and is for managers', async () => {
    const { page } = await bench.open(NOVEMBER, {
      role: 'manager',
      prepare: (state) => state.failures.set('/api/energy/hours', 'internal'),
    });
    await page.getByRole('region', { name: 'Hour by hour' }).first().getByRole('alert').waitFor();
    await page.getByRole('heading', { level: 1, name: /^November 2026 used/ }).waitFor();
    const technician = await bench.open(NOVEMBER, { role: 'technician' });
    await technician.page.getByText('This page is not for your role.').first().waitFor();
  });
});

describe('energy on a pump’s page', () => {
  it('is told by day and by month, with savings, their method and what is not covered', async () => {
    const { page } = await bench.open(`/pumps/${fakeId('pump', 2)}?month=2026-11`, { role: 'manager' });
    const sheet = page.getByRole('region', { name: 'Energy, cost and water, November 2026' });
    await sheet.getByText('$181.50 ± $15.10', { exact: false }).first().waitFor();
    await sheet.getByText('IPMVP option A', { exact: false }).waitFor();
    await sheet.getByText('1 stretch without readings; the longest 40 min', { exact: false }).waitFor();
    await sheet.getByText('The days as a table', { exact: true }).click();
    const table = sheet.getByRole('table').filter({ hasText: 'Off-peak' });
    expect(await table.getByRole('row').count()).toBe(31);
    await sheet.getByRole('link', { name: 'By month' }).click();
    await page.getByRole('region', { name: 'Energy, cost and water' }).getByText('kWh a month').waitFor();
    expect(new URL(page.url()).searchParams.get('by')).toBe('month');
  });

  it('says that the flow cannot be told, and in the reader’s units what can', async () => {
    const { page } = await bench.open(`/pumps/${fakeId('pump', 2)}?month=2026-11`, {
      role: 'technician',
      prepare: (state) => {
        state.preferences = { ...state.preferences, units: 'si' };
      },
    });
    await page
      .getByRole('region', { name: /^Energy, cost and water/ })
      .getByText('m³ ±', { exact: false })
      .first()
      .waitFor();
  });
});

describe('a homeowner’s month', () => {
  it('is water, money and what was saved, in plain words', async () => {
    const { page } = await bench.open('/my-pump', { role: 'homeowner' });
    await page.getByText('Water turned over today').waitFor();
    await page.getByText('times your', { exact: false }).waitFor();
    await page.getByText('November 2026 came to', { exact: false }).waitFor();
    await page.getByText('against the old motor, same hours.').waitFor();
    await page.getByText('How we work it out').click();
    await page.getByText('its use is a guess from its plate', { exact: false }).waitFor();
  });

  it('stays readable when its energy cannot be read', async () => {
    const { page, state } = await bench.open('/my-pump', { role: 'homeowner' });
    await page.getByText('Water turned over today').waitFor();
    const path = state.calls
      .find((call) => call.includes('/energy?'))!
      .split(' ')[1]!
      .split('?')[0]!;
    const broken = await bench.open('/my-pump', {
      role: 'homeowner',
      prepare: ({ failures }) => failures.set(path, 'internal'),
    });
    await broken.page.getByRole('alert').getByText('The server made a mistake.').waitFor();
    await broken.page.getByText('Today at Saltern Way 12').waitFor();
  });
});
