import { describe, expect, it } from 'vitest';
import { createPageBench, eventually } from './page-bench.ts';

const bench = createPageBench();

describe('a homeowner’s page', () => {
  it('says in one sentence how the pump does, what comes next, and what happened', async () => {
    const { page } = await bench.open('/', { role: 'homeowner', width: 1180 });
    await page
      .getByRole('heading', { level: 1, name: /^Your pump is running at 1,\d{3} rpm, as planned\.$/ })
      .waitFor();
    await page.getByText('Tomorrow at 10 AM time clock 1 starts the cleaner.').waitFor();
    await page
      .getByRole('region', { name: 'What happened lately' })
      .getByText(/Started, and filled itself/)
      .waitFor();
    await page.getByText('Millrace only watches.').waitFor();
    expect(await page.getByRole('navigation', { name: 'Pages' }).getByRole('link').count()).toBe(1);
  });

  it('explains any time of the day in a homeowner’s words', async () => {
    const { page } = await bench.open('/my-pump', { role: 'homeowner', width: 1180 });
    await page.getByRole('slider').focus();
    await page.keyboard.press('Home');
    await page.getByText(/^Your pump is off until/).waitFor();
  });

  it('says what is wrong, that it is looked after, and whom to call', async () => {
    const { page } = await bench.open('/my-pump', {
      role: 'homeowner',
      width: 390,
      prepare: (state) => {
        const trouble = state.pumps[0]!.detail.alarm;
        state.pumps = state.pumps.map((pump) =>
          pump.customer === 'haverlock' ? { ...pump, detail: { ...pump.detail, alarm: trouble } } : pump,
        );
      },
    });
    await page.getByRole('heading', { level: 1, name: /is not moving water/ }).waitFor();
    await page.getByText('Larkmoor Pool Care knows and looks after it.').waitFor();
    expect(await page.getByRole('link', { name: /^Call Larkmoor/ }).getAttribute('href')).toBe('tel:+15555550100');
  });

  it('says what would be here when no pump is theirs yet', async () => {
    const { page } = await bench.open('/my-pump', { role: 'homeowner', size: 0 });
    await page.getByText('No pump is in your name yet.').waitFor();
  });

  it('keeps its preferences: units, clock and theme change what is on screen at once', async () => {
    const { page, state } = await bench.open('/profile', { role: 'homeowner' });
    await page.getByText('Now: 7:3', { exact: false }).waitFor();
    await page.getByLabel('24 hours').check();
    await page.getByText(/Now: 19:3\d, 40 °F/).waitFor();
    await page.getByLabel(/^SI/).check();
    await page.getByText(/Now: 19:3\d, 4\.4 °C/).waitFor();
    await page.getByLabel('Dark', { exact: true }).check();
    await eventually(() => page.evaluate(() => document.documentElement.dataset.theme)).toBe('dark');
    await page.getByText('Saved.').waitFor();
    expect(state.preferences).toEqual({ units: 'si', clock: '24', theme: 'dark' });
    await page.reload();
    expect(await page.evaluate(() => document.documentElement.dataset.theme)).toBe('dark');
  });

  it('puts a preference back that could not be kept', async () => {
    const { page } = await bench.open('/profile', {
      role: 'homeowner',
      prepare: (state) => state.failures.set('/api/session/preferences', 'unavailable'),
    });
    await page.getByLabel(/^SI/).click();
    await page.getByText('Not saved: The server cannot answer at the moment.').waitFor();
    expect(await page.getByLabel('US customary').isChecked()).toBe(true);
  });
});

it('says so when an address leads nowhere, and leads back', async () => {
  const { page } = await bench.open('/nowhere/at/all', { role: 'manager' });
  await page.getByRole('heading', { level: 1, name: 'No such page' }).waitFor();
  await page.getByRole('link', { name: 'Go to the first page' }).click();
  await page.waitForURL('**/fleet');
});
