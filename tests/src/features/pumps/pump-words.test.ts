import { describe, expect, it } from 'vitest';
import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import type { StripState } from '#src/components/charts/strip/strip-run.ts';
import { flowWords } from '#src/features/pumps/flow-words.ts';
import { viewHome } from '#src/features/pumps/home-view.ts';
import { instantWords } from '#src/features/pumps/instant-words.ts';
import { listLately } from '#src/features/pumps/lately-view.ts';
import { conditionOf, pumpHeading } from '#src/features/pumps/pump-heading.ts';
import { listSettings } from '#src/features/pumps/settings-view.ts';
import { describeDays } from '#src/lib/describe-days.ts';
import { createFormat } from '#src/lib/format/create-format.ts';
import { createFakeFleet } from '#tests/src/fake-api/fake-fleet.ts';
import { FAKE_EVENING } from '#tests/src/fake-api/fake-state.ts';
import { makeRun } from '#tests/src/support/make-run.ts';

const HOUR = 3_600_000;
const NOW = FAKE_EVENING;
const format = createFormat({ locale: 'en-US', preferences: { units: 'us', clock: 'locale' } });
const fleet = createFakeFleet(NOW);
const home = fleet.find(({ detail }) => detail.padName === 'Saltern Way 12')!;
const pump: PumpDetail = home.detail;
const stripOf = (state: Partial<StripState>): StripState => ({ runs: [], planned: [], failed: false, ...state });

describe('a pump’s heading', () => {
  const heading = (rpm: number, expectedRpm: number) =>
    pumpHeading({ ...pump, now: { ...pump.now!, rpm, expectedRpm } }, format, NOW);

  it('is the fact as a sentence', () => {
    expect(heading(1400, 1400)).toBe('Saltern Way 12, Filter pump: running at 1,400 rpm, as expected.');
    expect(heading(0, 0)).toBe('Saltern Way 12, Filter pump: standing still, as expected.');
    expect(heading(1700, 2850)).toBe('Saltern Way 12, Filter pump: running at 1,700 rpm where 2,850 rpm is expected.');
    expect(heading(0, 2850)).toBe('Saltern Way 12, Filter pump: standing still where 2,850 rpm is expected.');
    expect(heading(1700, 0)).toBe('Saltern Way 12, Filter pump: running at 1,700 rpm where nothing is due.');
  });

  it('says since when nothing was heard rather than show an old speed', () => {
    expect(pumpHeading({ ...pump, silentSince: NOW - HOUR }, format, NOW)).toBe(
      'Saltern Way 12, Filter pump: not heard since 6:30\u00a0PM.',
    );
  });

  it('forgives what a tachometer errs', () => {
    expect(conditionOf({ rpm: 1665, expectedRpm: 1700 })).toBe('running');
    expect(conditionOf({ rpm: 1600, expectedRpm: 1700 })).toBe('off');
  });
});

describe('the sentence for an instant', () => {
  const words = (at: number | undefined, strip: StripState) =>
    instantWords({ pump, strip, at, now: NOW, format, voice: 'technician' });

  it('explains now when nobody points anywhere', () => {
    expect(words(undefined, stripOf({})).why).toMatch(/^Program entry \d/);
  });

  it('explains the run under the cursor, with what was measured and what was expected', () => {
    const run = makeRun({
      from: NOW - 2 * HOUR,
      to: NOW - HOUR,
      source: 'program',
      expectedSource: 'input',
      activeInput: 1,
      closedInputs: 1,
      meanRpm: 1700,
      expectedRpm: 2850,
      flags: ['off-expected'],
    });
    const { figures, why } = words(NOW - 1.5 * HOUR, stripOf({ runs: [run] }));
    expect(figures).toBe('1,700 rpm (2,850 rpm expected), 300 W');
    expect(why).toMatch(/^Input 1 \(time clock 1, cleaner\) closed: 2,850 rpm until it opens\./);
  });

  it('says what is planned ahead, and that it does not know where it does not', () => {
    const planned = [
      { from: NOW + HOUR, to: NOW + 2 * HOUR, source: 'program' as const, closedInputs: 0, activeInput: 0, rpm: 1400 },
    ];
    expect(words(NOW + 1.5 * HOUR, stripOf({ planned })).why).toBe('Planned: program at 1,400 rpm.');
    expect(words(NOW - 9 * HOUR, stripOf({ planned })).why).toBe('Nothing is known of this instant.');
  });

  it('gives no figures of a time without data', () => {
    const gap = makeRun({ from: NOW - HOUR, to: null, source: 'no-data', expectedSource: 'no-data', meanRpm: 0 });
    expect(words(NOW - 1, stripOf({ runs: [gap] }))).toEqual({ figures: undefined, why: 'No readings.' });
  });
});

describe('the homeowner’s page', () => {
  const company = { name: 'Larkmoor Pool Care' };
  const alarm = fleet.find(({ detail }) => detail.serial === 'MR-000101')!.detail.alarm!;

  it('says in plain words that all is well, and what comes next', () => {
    const { heading, lead, trouble } = viewHome(pump, company, format, NOW);
    expect(heading).toMatch(/^Your pump is running at 1,\d{3} rpm, as planned\.$/);
    expect(lead).toEqual([
      expect.stringMatching(/program runs at/),
      'Tomorrow at 10 AM time clock 1 starts the cleaner.',
    ]);
    expect(trouble).toBe(false);
  });

  it('says what is wrong and who looks after it', () => {
    const view = viewHome({ ...pump, alarm }, company, format, NOW);
    expect(view.heading).toMatch(/^Your pump started but is not moving water\./);
    expect(view.lead.at(-1)).toBe('Larkmoor Pool Care knows and looks after it.');
    expect(view.trouble).toBe(true);
  });

  it('is not troubled by what only our own work list needs', () => {
    expect(viewHome({ ...pump, alarm: { ...alarm, priority: 'note' } }, company, format, NOW).trouble).toBe(false);
  });

  it('never guesses at a pump it cannot see', () => {
    const view = viewHome({ ...pump, silentSince: NOW - HOUR, heardAt: NOW - HOUR }, company, format, NOW);
    expect(view.heading).toBe('We cannot see your pump at the moment.');
    expect(view.lead[0]).toBe('Last heard 6:30\u00a0PM. It may be running as always.');
  });
});

describe('what happened lately', () => {
  it('tells the unusual with how long it lasted, and the last good start', () => {
    const runs = [
      makeRun({ source: 'prime', from: NOW - 30 * HOUR, to: NOW - 30 * HOUR + 52_000 }),
      makeRun({ source: 'no-data', from: NOW - 20 * HOUR, to: NOW - 20 * HOUR + 100 * 60_000 }),
      makeRun({ source: 'keypad', from: NOW - 2 * HOUR, to: NOW - 1.5 * HOUR }),
    ];
    expect(listLately(runs, NOW).map(({ text }) => text)).toEqual([
      'Ran at a speed chosen on its keypad for 30 min.',
      'Nothing was heard from it for 1 h 40. It may have been running as always.',
      'Started, and filled itself with water for 52 s.',
    ]);
  });

  it('leaves out everyday life, short gaps and starts that did not prime', () => {
    const runs = [
      makeRun({ source: 'program', from: 0, to: 9 * HOUR }),
      makeRun({ source: 'no-data', from: 9 * HOUR, to: 9 * HOUR + 60_000 }),
      makeRun({ source: 'prime', from: 10 * HOUR, to: 11 * HOUR, flags: ['unprimed'] }),
    ];
    expect(listLately(runs, 12 * HOUR)).toEqual([]);
  });

  it('tells of pieces that belong together as one', () => {
    const piece = (from: number) => makeRun({ source: 'freeze', from: from * 60_000, to: (from + 20) * 60_000 });
    expect(listLately([piece(0), piece(25)], 2 * HOUR)).toEqual([
      { at: 0, text: 'Freeze protection kept the water moving for 45 min.' },
    ]);
  });
});

describe('settings', () => {
  it('name days in a few words', () => {
    const days = (text: string) =>
      describeDays(
        [...text].map((flag) => flag === '1'),
        'en-US',
      );
    expect(['1111111', '1111100', '0000011', '1010000'].map(days)).toEqual([
      'every day',
      'Mon to Fri',
      'Sat, Sun',
      'Mon, Wed',
    ]);
  });

  it('say what is off', () => {
    const settings = { ...pump.settings, prime: null, timed: null, freeze: null };
    expect(Object.fromEntries(listSettings({ settings }, format))).toMatchObject({
      Prime: 'off',
      'Timed run': 'off',
      'Freeze protection': 'off',
    });
  });
});

describe('the flow', () => {
  const now = { ...pump.now!, rpm: 1700, flow: { gpm: 31, sigmaGpm: 3.2 } };
  const running = { now, silentSince: null, wetEndModel: 'Aldermere 100' };

  it('is told with one standard deviation, in the reader’s units', () => {
    expect(flowWords(running, format)).toBe('Flow now 31 gpm ± 3.2 gpm (one standard deviation), read from the watts.');
  });

  it('is nothing while it stands or turns without load', () => {
    const none = { gpm: 0, sigmaGpm: 0 };
    expect(flowWords({ ...running, now: { ...now, rpm: 0, flow: none } }, format)).toContain('stands still');
    expect(flowWords({ ...running, now: { ...now, flow: none } }, format)).toContain('turns without load');
  });

  it('cannot be told without a curve or closely enough, and is not guessed of a silent pump', () => {
    expect(flowWords({ ...running, now: { ...now, flow: null } }, format)).toContain('cannot tell. Neither');
    expect(flowWords({ ...running, wetEndModel: null, now: { ...now, flow: null } }, format)).toContain(
      'No wet-end curve',
    );
    expect(flowWords({ ...running, silentSince: 1 }, format)).toBeUndefined();
  });
});
