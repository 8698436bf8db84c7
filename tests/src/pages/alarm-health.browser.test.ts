import { readFile } from 'node:fs/promises';
import { describe, expect, it } from 'vitest';
import { createPageBench } from './page-bench.ts';

const bench = createPageBench();
const PAGE = '/alarms/health';

describe('the page about the alarms’ health', () => {
  it('states the figures as sentences beside their targets, and where those come from', async () => {
    const { page } = await bench.open(PAGE, { role: 'manager' });
    await page.getByRole('heading', { level: 1, name: '1 figure of the alarms is over its target.' }).waitFor();
    const facts = page.getByRole('region', { name: 'Figures and targets' });
    const stale = facts.getByRole('listitem').filter({ hasText: 'Stale' });
    expect(await stale.textContent()).toMatch(/At most 1 on one day, .*; 1 now\.Fewer than 5 on any day/);
    const priorities = facts.getByRole('listitem').filter({ hasText: 'Priorities' });
    expect(await priorities.textContent()).toMatch(/94 % urgent, 6 % soon, 0 % note\.About 5 % urgent.*over$/);
    await facts.getByText('ISA-18.2-2016').waitFor();
  });

  it('leads from the worst offender to its alarm and its pump', async () => {
    const { page } = await bench.open(PAGE, { role: 'manager' });
    const row = page.getByRole('region', { name: 'What repeats most' }).first().getByRole('row').nth(1);
    expect(await row.textContent()).toMatch(/^30.*Did not prime.*94 %$/);
    expect(await row.getByRole('link').nth(0).getAttribute('href')).toMatch(/^\/alarms\/[0-9a-f-]{36}$/);
    expect(await row.getByRole('link').nth(1).getAttribute('href')).toMatch(/^\/pumps\/[0-9a-f-]{36}$/);
  });

  it('keeps range and person in its address, and the table behind the bars one click away', async () => {
    const { page, state } = await bench.open(PAGE, { role: 'manager' });
    await page.getByRole('link', { name: '90 days' }).click();
    await page
      .getByRole('region', { name: 'By technician' })
      .first()
      .getByRole('link', { name: 'Joss Aldane' })
      .click();
    expect(new URL(page.url()).searchParams.get('range')).toBe('90');
    expect(new URL(page.url()).searchParams.get('who')).toMatch(/^[0-9a-f-]{36}$/);
    expect(state.calls.some((call) => call.includes('from=2026-09-02&until=2026-12-02'))).toBe(true);
    await page.getByText('Alarms by day as a table').click();
    const table = page.getByRole('table').filter({ hasText: 'Day' });
    expect(await table.getByRole('row').count()).toBeGreaterThan(30);
  });

  it('saves its figures as a file', async () => {
    const { page } = await bench.open(PAGE, { role: 'manager' });
    const download = page.waitForEvent('download');
    await page
      .getByRole('region', { name: 'Figures and targets' })
      .getByRole('button', { name: 'Save as CSV' })
      .click();
    const saved = await download;
    expect(saved.suggestedFilename()).toBe('alarm-health.csv');
    const text = await readFile(await saved.path(), 'utf8');
    expect(text).toMatch(/^\ufeffFigure,Found,Target,Verdict,Source\r\nAlarms a day,/);
    expect(text).toContain('ISA-18.2');
  });

  it('is for managers, and says what to do when the server cannot answer', async () => {
    const technician = await bench.open(PAGE, { role: 'technician' });
    await technician.page.getByText('This page is not for your role.').first().waitFor();
    const broken = await bench.open(PAGE, {
      role: 'manager',
      prepare: (state) => state.failures.set('/api/alarm-health', 'unavailable'),
    });
    await broken.page.getByRole('alert').getByText('The server cannot answer at the moment.').waitFor();
  });
});
