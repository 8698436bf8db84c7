import { describe, expect, it } from 'vitest';
import { fakeId } from '#tests/src/fake-api/fake-id.ts';
import { createPageBench, eventually } from './page-bench.ts';

const bench = createPageBench();
const QUARRY = `/pumps/${fakeId('pump', 2)}`;

describe('a pump’s page', () => {
  it('states the fact, explains now, and what was any other time of the day', async () => {
    const { page } = await bench.open(QUARRY, { role: 'manager' });
    await page
      .getByRole('heading', {
        level: 1,
        name: 'Quarry Lane 18, Filter pump: running at 1,702 rpm where 2,850 rpm is expected.',
      })
      .waitFor();
    await page.getByText('Measured 1,702 rpm (program).').waitFor();
    const slider = page.getByRole('slider', { name: 'Time under the cursor' });
    await slider.focus();
    await page.keyboard.press('Home');
    await page.getByText('nothing is due until 3 AM', { exact: false }).waitFor();
    expect(await slider.getAttribute('aria-valuetext')).toMatch(/^12\u00a0AM\. 0 rpm, 6 W\. Nothing is due until 3 AM/);
  });

  it('draws measured against expected speed and watts, with the numbers in a table', async () => {
    const { page } = await bench.open(QUARRY, { role: 'manager' });
    await page.getByRole('img', { name: 'Speed, rpm' }).locator('canvas').waitFor();
    await page.getByRole('img', { name: 'Watts' }).locator('canvas').waitFor();
    await page.getByText('Readings as a table').click();
    const readings = page.getByRole('table').filter({ hasText: 'lowest to highest' });
    await eventually(() => readings.getByRole('row').count()).toBeGreaterThan(70);
    await page.getByText('Runs of Quarry Lane 18').click();
    expect(await page.getByRole('table').filter({ hasText: 'Commanded by' }).textContent()).toContain('Input 1');
  });

  it('shares one cursor between strip and charts', async () => {
    const { page } = await bench.open(QUARRY, { role: 'manager' });
    const chart = page.getByRole('img', { name: 'Watts' });
    await chart.locator('.u-over').hover({ position: { x: 400, y: 60 } });
    await eventually(() => page.getByRole('slider').evaluate((handle) => handle.classList.contains('bg-focus'))).toBe(
      true,
    );
    const line = page.getByRole('img', { name: 'Speed, rpm' }).locator('.u-cursor-x');
    await eventually(() => line.evaluate((element) => element.getBoundingClientRect().left)).toBeGreaterThan(300);
  });

  it('goes day by day, and a link to a day is that day', async () => {
    const { page } = await bench.open(QUARRY, { role: 'manager' });
    await page.getByRole('link', { name: '‹ day before' }).click();
    await page.getByRole('heading', { name: 'Mon, Nov 30, 2026' }).waitFor();
    expect(new URL(page.url()).search).toBe('?day=2026-11-30');
    await page.getByRole('link', { name: 'Back to today' }).click();
    await page.getByRole('heading', { name: 'Today, Tue, Dec 1' }).waitFor();
  });

  it('shows settings, wiring and interlocks', async () => {
    const { page } = await bench.open(QUARRY, { role: 'manager' });
    await page.getByRole('region', { name: 'Settings' }).getByText('3 AM').waitFor();
    const wiring = page.getByRole('region', { name: 'Speed inputs and what closes them' }).first();
    expect(await wiring.textContent()).toContain('opens 20 min early');
    expect(await wiring.textContent()).toContain('not wired');
    await page.getByText('A closed input is not flow').waitFor();
    await page.getByRole('link', { name: 'Input 1 closed, runs program speed' }).waitFor();
  });

  it('says what to do when it is not there, or the server cannot answer', async () => {
    const missing = await bench.open(`/pumps/${fakeId('pump', 99)}`, { role: 'manager' });
    await missing.page.getByRole('alert').getByText('There is no such thing here.').waitFor();
    const broken = await bench.open(QUARRY, {
      role: 'manager',
      prepare: (state) => state.failures.set('/api/strips', 'internal'),
    });
    await broken.page.getByText('The runs could not be read. The page tries again by itself.').waitFor();
  });
});
