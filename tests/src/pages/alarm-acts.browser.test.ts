import { readFile } from 'node:fs/promises';
import { describe, expect, it } from 'vitest';
import { fakeId } from '#tests/src/fake-api/fake-id.ts';
import { listAxeViolations } from '#tests/support/browser.ts';
import { createPageBench, eventually, type Opened } from './page-bench.ts';

const bench = createPageBench();
const PRIME = fakeId('alarm', 1);

const rowOf = ({ page }: Opened, pad: string) => page.getByRole('article').filter({ hasText: pad });
const openList = (path = '/alarms', role: 'manager' | 'technician' = 'manager') => bench.open(path, { role });

describe('a row of the alarms page', () => {
  it('is held until an instant with a reason, leaves the list, and comes back by Undo', async () => {
    const opened = await openList();
    const { page, state } = opened;
    const row = rowOf(opened, 'Tern Court 4');
    await row.getByRole('button', { name: /^Hold until… Did not prime/ }).click();
    const dialog = page.getByRole('dialog', { name: 'Hold until' });
    await dialog.getByLabel('In an hour').check();
    await dialog.getByRole('button', { name: 'Hold', exact: true }).click();
    await dialog.getByText('Say why.').waitFor();
    expect(state.pumps[0]?.alarm?.shelvedUntil).toBeNull();
    await dialog.getByLabel('Why').fill('lid ring on order');
    expect(await listAxeViolations(page)).toEqual([]);
    await dialog.getByRole('button', { name: 'Hold', exact: true }).click();
    await eventually(() => row.count()).toBe(0);
    expect(state.pumps[0]?.alarm).toMatchObject({ shelvedReason: 'lid ring on order', shelvedBy: 'Ilse Ravn' });
    await page.getByRole('button', { name: 'On hold 1' }).waitFor();
    await page
      .getByRole('status')
      .getByRole('button', { name: /^Undo On hold/ })
      .click();
    await row.waitFor();
    expect(state.pumps[0]?.alarm?.shelvedUntil).toBeNull();
  });

  it('that is on hold says until when, by whom and why, and is let go', async () => {
    const opened = await bench.open('/alarms?show=shelved', {
      role: 'technician',
      prepare: (state) => {
        const [first] = state.pumps;
        if (first?.alarm !== undefined)
          first.alarm = {
            ...first.alarm,
            shelvedUntil: state.now() + 3_600_000,
            shelvedBy: 'Ilse Ravn',
            shelvedReason: 'lid ring on order',
          };
      },
    });
    const row = rowOf(opened, 'Tern Court 4');
    await row.getByText(/on hold until .* by Ilse Ravn: lid ring on order/).waitFor();
    await row.getByRole('button', { name: /^End the hold/ }).click();
    await eventually(() => opened.state.pumps[0]?.alarm?.shelvedUntil).toBeNull();
  });

  it('offers a technician what is theirs to do, and a manager the rest', async () => {
    const names = async (role: 'manager' | 'technician') => {
      const opened = await openList('/alarms', role);
      const row = rowOf(opened, 'Tern Court 4');
      await row.getByRole('button', { name: /^More/ }).click();
      return row.getByRole('button').allTextContents();
    };
    expect(await names('technician')).toEqual(['Acknowledge', 'Hold until…', 'Nothing to do…', 'Less']);
    expect(await names('manager')).toEqual([
      'Acknowledge',
      'Hold until…',
      'Nothing to do…',
      'Give to…',
      'Take out of service…',
      'Less',
    ]);
  });

  it('is given to a technician, whose open alarms one sees', async () => {
    const opened = await openList();
    const row = rowOf(opened, 'Tern Court 4');
    await row.getByRole('button', { name: /^More/ }).click();
    await row.getByRole('button', { name: /^Give to/ }).click();
    const dialog = opened.page.getByRole('dialog');
    await dialog.getByText('3 open alarms').waitFor();
    await dialog.getByLabel(/Wren Tallow/).check();
    await dialog.getByRole('button', { name: 'Give', exact: true }).click();
    await row.getByText(/goes to Wren Tallow/).waitFor();
  });

  it('takes “nothing to do” for an answer, and back', async () => {
    const opened = await openList('/alarms', 'technician');
    const row = rowOf(opened, 'Tern Court 4');
    await row.getByRole('button', { name: /^More/ }).click();
    await row.getByRole('button', { name: /^Nothing to do/ }).click();
    const dialog = opened.page.getByRole('dialog');
    await dialog.getByRole('textbox').fill('air bled this morning');
    await dialog.getByRole('button', { name: 'Nothing to do', exact: true }).click();
    await row.getByText(/nothing to do, says Joss Aldane: air bled this morning/).waitFor();
    await opened.page
      .getByRole('status')
      .getByRole('button', { name: /^Undo Nothing to do/ })
      .click();
    await row.getByText('nobody has acknowledged it').waitFor();
  });

  it('puts back what the server refused, and says why', async () => {
    const opened = await bench.open('/alarms', {
      role: 'manager',
      prepare: (state) => state.failures.set('/api/alarms/acts', 'conflict'),
    });
    const row = rowOf(opened, 'Tern Court 4');
    await row.getByRole('button', { name: /^Hold until/ }).click();
    await opened.page.getByRole('dialog').getByLabel('Why').fill('why');
    await opened.page.getByRole('dialog').getByRole('button', { name: 'Hold', exact: true }).click();
    await opened.page.getByText(/^Not done: Did not prime.*Somebody else has changed this/).waitFor();
    await row.getByText('nobody has acknowledged it').waitFor();
  });
});

describe('several alarms', () => {
  it('are acknowledged at once, and that is taken back at once', async () => {
    const { page, state } = await openList();
    await page.getByLabel('Select all shown').check();
    const bar = page.getByRole('region', { name: 'What is done to those selected' });
    await bar.getByText(/\d selected/).waitFor();
    const waiting = () => state.pumps.filter(({ alarm }) => alarm?.alarmClass === 'alarm' && !alarm.acknowledgedAt);
    const before = waiting().length;
    expect(before).toBeGreaterThan(1);
    await bar.getByRole('button', { name: 'Acknowledge' }).click();
    await eventually(() => waiting().length).toBe(0);
    await page.getByRole('heading', { level: 1, name: 'Every alarm that stands is acknowledged.' }).waitFor();
    await page
      .getByRole('status')
      .getByRole('button', { name: /^Undo Acknowledged/ })
      .click();
    await eventually(() => waiting().length).toBe(before);
  });

  it('are held together, for one reason', async () => {
    const { page, state } = await openList();
    await page.getByLabel('Select all shown').check();
    await page.getByRole('button', { name: 'Hold until…', exact: true }).click();
    await page
      .getByRole('dialog')
      .getByText(/^\d alarms$/)
      .waitFor();
    await page.getByRole('dialog').getByLabel('Why').fill('power works in the street');
    await page.getByRole('dialog').getByRole('button', { name: 'Hold', exact: true }).click();
    await page
      .getByRole('heading', { level: 1, name: 'No alarm stands.' })
      .or(page.getByText('No alarm stands.').first())
      .waitFor();
    expect(
      state.pumps.filter(({ alarm }) => alarm?.shelvedReason === 'power works in the street').length,
    ).toBeGreaterThan(1);
  });
});

describe('the work list', () => {
  it('has notes by pad with the next stop, and closes one with what was found', async () => {
    const opened = await openList('/alarms', 'technician');
    const { page, state } = opened;
    const list = page.getByRole('region', { name: 'Work list' });
    const note = list.getByRole('article').filter({ hasText: 'Time clock 2 is' });
    await list
      .getByText(/next stop Thu, Dec 3/)
      .first()
      .waitFor();
    await note.getByRole('button', { name: /^Done/ }).click();
    const dialog = page.getByRole('dialog', { name: 'Done: what we found' });
    await dialog.getByRole('button', { name: 'Done', exact: true }).click();
    await dialog.getByText('Say what you found.').waitFor();
    await dialog.getByRole('textbox').fill('Set the clock, trippers tight');
    await dialog.getByLabel('A power cut').check();
    expect(await listAxeViolations(page)).toEqual([]);
    await dialog.getByRole('button', { name: 'Done', exact: true }).click();
    await eventually(() => note.count()).toBe(0);
    const worked = state.pumps.find(({ alarm }) => alarm?.done !== null && alarm?.done !== undefined)?.alarm;
    expect(worked?.done).toMatchObject({ found: 'Set the clock, trippers tight', cause: 'power-cut' });
    await page.getByRole('button', { name: 'History' }).click();
    await list.getByText('Set the clock, trippers tight').waitFor();
    await list.getByText(/done by Joss Aldane/).waitFor();
  });
});

describe('the list in another form', () => {
  it('is a table in the address, alarms and notes with the same words', async () => {
    const { page } = await openList('/alarms?view=table');
    const table = page.getByRole('table');
    await table.getByRole('link', { name: 'Did not prime, 3 tries' }).waitFor();
    await table.getByText('nobody has acknowledged it').first().waitFor();
    expect(await listAxeViolations(page)).toEqual([]);
    await page.getByLabel('As', { exact: true }).selectOption('rows');
    await eventually(() => new URL(page.url()).search).toBe('');
  });

  it('is saved as a file of every row', async () => {
    const { page } = await openList();
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('button', { name: 'Save as CSV' }).click(),
    ]);
    expect(download.suggestedFilename()).toMatch(/^alarms-\d{4}-\d{2}-\d{2}\.csv$/);
    const text = await readFile(await download.path(), 'utf8');
    expect(text).toMatch(/^\ufeffPriority,What,Pad,Pump/);
    expect(text).toContain('"Did not prime, 3 tries",Tern Court 4');
    expect(text).toContain('Motor clock drifts');
  });
});

describe('an alarm’s page', () => {
  it('ranks what may lie behind it, with what speaks for and against', async () => {
    const { page } = await bench.open(`/alarms/${PRIME}`, { role: 'technician', width: 390, height: 844 });
    const causes = page.getByRole('region', { name: /causes$/ });
    await causes.getByText('Air leak on the suction side').waitFor();
    await causes.getByText('For it:').first().waitFor();
    expect(await causes.textContent()).not.toMatch(/\d\s?%/);
  });

  it('does on a phone what the list does, in targets for a gloved hand', async () => {
    const { page, state } = await bench.open(`/alarms/${PRIME}`, { role: 'technician', width: 390, height: 844 });
    const panel = page.getByRole('region', { name: 'What to do about it' });
    for (const button of await panel.getByRole('button').all())
      expect((await button.boundingBox())?.height).toBeGreaterThanOrEqual(48);
    await panel.getByRole('button', { name: /^Hold until/ }).click();
    const dialog = page.getByRole('dialog');
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
    await dialog.getByLabel('Another time').check();
    await dialog.getByLabel('Day and time at the pad').fill('2020-01-01T08:00');
    await dialog.getByLabel('Why').fill('why');
    await dialog.getByRole('button', { name: 'Hold', exact: true }).click();
    await dialog.getByText(/^A hold ends in the future/).waitFor();
    await dialog.getByLabel('Day and time at the pad').fill('2026-12-02T08:00');
    await dialog.getByRole('button', { name: 'Hold', exact: true }).click();
    await page
      .getByText(/on hold until/)
      .first()
      .waitFor();
    // 8:00 in the morning in Los Angeles.
    expect(state.pumps[0]?.alarm?.shelvedUntil).toBe(Date.UTC(2026, 11, 2, 16));
  });

  it('closes its question with Escape and gives the focus back', async () => {
    const { page } = await bench.open(`/alarms/${PRIME}`, { role: 'manager' });
    const hold = page.getByRole('button', { name: /^Hold until/ });
    await hold.focus();
    await page.keyboard.press('Enter');
    await page.getByRole('dialog').waitFor();
    await page.keyboard.press('Escape');
    await eventually(() => page.getByRole('dialog').count()).toBe(0);
    expect(await hold.evaluate((element) => element === document.activeElement)).toBe(true);
  });

  it('leaves the keyboard beside the way back when the row has left the list, and at the heading after it', async () => {
    const { page, state } = await bench.open('/alarms', { role: 'manager' });
    await page
      .getByRole('button', { name: /^Hold until… Did not prime/ })
      .first()
      .focus();
    await page.keyboard.press('Enter');
    await page.getByRole('dialog').getByLabel('Why').fill('Waiting for the part');
    await page.getByRole('dialog').getByRole('button', { name: 'Hold', exact: true }).focus();
    await page.keyboard.press('Enter');
    const undo = page.getByRole('button', { name: /^Undo On hold: Did not prime/ });
    await undo.waitFor();
    await page.waitForFunction(() => document.activeElement?.closest('[role=status]') !== null);
    await page.keyboard.press('Tab');
    expect(await undo.evaluate((element) => element === document.activeElement)).toBe(true);
    await page.keyboard.press('Enter');
    await page.waitForFunction(() => document.activeElement?.tagName === 'H1');
    await eventually(() => state.pumps[0]?.alarm?.shelvedUntil).toBe(null);
  });
});
