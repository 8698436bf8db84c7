import { describe, expect, it } from 'vitest';
import { changeAlarm } from '#tests/src/fake-api/fake-handlers.ts';
import { fakeId } from '#tests/src/fake-api/fake-id.ts';
import { createPageBench, eventually } from './page-bench.ts';

const bench = createPageBench();
const PRIME = fakeId('alarm', 1);

describe('the alarms page', () => {
  it('lists alarms by priority with their day, and beside them what can wait', async () => {
    const { page } = await bench.open('/alarms', { role: 'manager' });
    await page.getByRole('heading', { level: 1, name: /alarms wait for an acknowledgement/ }).waitFor();
    const list = page.getByRole('region', { name: 'Alarms' });
    expect(await list.getByRole('article').first().textContent()).toMatch(/Did not prime, 3 tries.*Tern Court 4/);
    expect(await list.getByRole('article').first().locator('canvas').count()).toBe(1);
    expect(await page.getByRole('region', { name: 'Work list' }).textContent()).toContain(
      'Motor clock drifts, now 37 min slow',
    );
  });

  it('acknowledges at once, and takes it back', async () => {
    const { page, state } = await bench.open('/alarms', { role: 'manager' });
    const row = page.getByRole('article').filter({ hasText: 'Tern Court 4' });
    await row.getByRole('button', { name: /^Acknowledge: Did not prime/ }).click();
    await row.getByText('acknowledged by Ilse Ravn').waitFor();
    expect(state.pumps[0]?.alarm?.state).toBe('acknowledged');
    await page
      .getByRole('status')
      .getByRole('button', { name: /^Undo acknowledging/ })
      .click();
    await row.getByText('nobody has acknowledged it').waitFor();
    expect(state.pumps[0]?.alarm?.state).toBe('unacknowledged');
  });

  it('puts an acknowledgement back that the server refused, and says so', async () => {
    const { page } = await bench.open('/alarms', {
      role: 'manager',
      prepare: (state) => state.failures.set(`/api/alarms/${PRIME}/acknowledgement`, 'unavailable'),
    });
    const row = page.getByRole('article').filter({ hasText: 'Tern Court 4' });
    await row.getByRole('button', { name: /^Acknowledge/ }).click();
    await page
      .getByRole('status')
      .getByText(/^Not acknowledged: Did not prime/)
      .waitFor();
    await row.getByText('nobody has acknowledged it').waitFor();
  });

  it('shows another’s acknowledgement without a reload', async () => {
    const opened = await bench.open('/alarms', { role: 'manager' });
    const beside = await bench.openBeside(opened, `/alarms/${PRIME}`);
    const count = opened.page.getByRole('link', { name: /unacknowledged/ });
    await count.waitFor();
    await beside.getByRole('button', { name: /^Acknowledge/ }).click();
    await opened.page.getByRole('article').filter({ hasText: 'Tern Court 4' }).getByText('acknowledged by').waitFor();
  });

  it('tells a screen reader of an alarm raised meanwhile, once and politely', async () => {
    const opened = await bench.open('/alarms', { role: 'manager' });
    await opened.page.getByRole('article').first().waitFor();
    await eventually(() => opened.state.sockets.size).toBe(1);
    changeAlarm(opened.state, PRIME, { raisedAt: opened.state.now() });
    await opened.page
      .locator('[aria-live=polite]')
      .getByText('New urgent alarm: Did not prime, 3 tries, Tern Court 4, Filter pump.')
      .waitFor({ state: 'attached' });
  });

  it('is narrowed by its address, and says when nothing fits', async () => {
    const { page } = await bench.open('/alarms?priority=urgent', { role: 'manager' });
    await eventually(() => page.getByRole('region', { name: 'Alarms' }).getByRole('article').count()).toBe(1);
    await page.getByRole('searchbox').fill('nowhere');
    await eventually(() => new URL(page.url()).search).toBe('?priority=urgent&q=nowhere');
    await page.getByRole('region', { name: 'Alarms' }).getByText('None matches.').waitFor();
  });

  it('says that all is well when it is', async () => {
    const { page } = await bench.open('/alarms', {
      role: 'technician',
      prepare: (state) => {
        state.pumps = state.pumps.map((pump) => ({ ...pump, alarm: undefined }));
      },
    });
    await page.getByRole('heading', { level: 1, name: 'No alarm stands.' }).waitFor();
    await page.getByText('its technician has a mail').waitFor();
  });
});

describe('an alarm’s page, on a phone', () => {
  const open = (options: Parameters<typeof bench.open>[1] = {}) =>
    bench.open(`/alarms/${PRIME}`, { role: 'technician', width: 390, height: 844, ...options });

  it('says what, since when, what to look at first, and what makes it safe', async () => {
    const { page } = await open();
    await page.getByRole('heading', { level: 1, name: 'Tern Court 4' }).waitFor();
    expect(await page.title()).toBe('Did not prime, 3 tries, Tern Court 4, Filter pump · Millrace');
    await page.getByRole('heading', { name: 'Look first, power stays on' }).waitFor();
    await page.getByText('Lid and O-ring: seated, dry, no hiss').waitFor();
    await page.getByText('Before a lid or filter is opened').click();
    await page.getByText('Lock out the breakers').waitFor();
    await page.getByText('Millrace only watches').waitFor();
  });

  it('has live readings that move', async () => {
    const { page, state } = await open();
    const now = page.locator('#now');
    await now.waitFor();
    const pump = state.pumps[0]!;
    pump.detail = { ...pump.detail, now: { ...pump.detail.now!, rpm: 3450, watts: 1444, expectedRpm: 3450 } };
    await eventually(() => state.sockets.size).toBe(1);
    changeAlarm(state, PRIME, {});
    await now.getByText('3,450').first().waitFor();
    await now.getByText('1,444').waitFor();
  });

  it('sends the note with the acknowledgement', async () => {
    const { page, state } = await open();
    await page.locator('summary', { hasText: 'A note with it' }).click();
    await page.getByRole('textbox').fill('On my way, lid first');
    await page.getByRole('button', { name: /^Acknowledge/ }).click();
    await page.getByText('On my way, lid first').waitFor();
    expect(state.pumps[0]?.alarm?.acknowledgementNote).toBe('On my way, lid first');
  });

  it('gives every control of the phone a target of 24 px, its main ones 48', async () => {
    const { page } = await open();
    await page.getByRole('button', { name: /^Acknowledge/ }).waitFor();
    const small = await page.locator('a, button, summary, input, select').evaluateAll((controls) =>
      controls
        .filter((control) => control.checkVisibility())
        .map((control) => ({ name: control.textContent, ...control.getBoundingClientRect().toJSON() }))
        .filter(({ width, height }) => width > 1 && (width < 24 || height < 24)),
    );
    expect(small).toEqual([]);
    const box = await page.getByRole('button', { name: /^Acknowledge/ }).boundingBox();
    expect(box?.height).toBeGreaterThanOrEqual(48);
  });

  it('is not for a homeowner, and says so when it is gone', async () => {
    const home = await open({ role: 'homeowner' });
    await home.page.getByText('This page is not for your role.').first().waitFor();
    const gone = await bench.open(`/alarms/${fakeId('alarm', 77)}`, { role: 'technician' });
    await gone.page.getByRole('alert').getByText('There is no such thing here.').waitFor();
  });
});
