import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decide } from '#shared/domain/control/decide.ts';
import type { Because } from '#shared/domain/control/decision.ts';
import { type Explained, explain, explainedDecision, explainShort } from '#shared/domain/control/explain.ts';
import { ENGLISH_MESSAGES } from '#shared/domain/control/explain-messages.data.ts';
import { explainNext } from '#shared/domain/control/explain-next.ts';
import type { ExplainOptions } from '#shared/domain/control/explain-options.ts';
import { explainedRun } from '#shared/domain/control/explain-run.ts';
import { plan } from '#shared/domain/control/plan.ts';
import type { WiredInput } from '#shared/domain/control/pump-context.ts';
import type { Situation } from '#shared/domain/control/situation.ts';
import { recordedWindows } from '#shared/domain/control/window-spans.ts';
import { SOURCES } from '#shared/domain/readings/reading.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import { EVERY_DAY, entry, inventedPump, wall } from './invented-pump.ts';

const CLEANER: WiredInput = {
  number: 1,
  kind: 'clock',
  windows: [{ days: EVERY_DAY, onMinute: 600, offMinute: 840, opensEarlyMinutes: 0 }],
  drives: 'cleaner',
};
const CONTEXT = inventedPump({
  settings: { program: [entry('06:00', '17:00', 1725), entry('17:00', '22:00', 1400)] },
  inputs: [CLEANER, { number: 2, kind: 'heater-call', windows: [] }],
});
const day = (text: string): number => wall(CONTEXT.zone, `2025-07-01 ${text}`);
const HOMEOWNER: ExplainOptions = { voice: 'homeowner', hour12: true, locale: 'en-US' };
const TECHNICIAN: ExplainOptions = { voice: 'technician', hour12: true, locale: 'en-US' };

function decided(time: string, situation: Partial<Situation> = {}): Explained {
  const full = { at: day(time), zone: CONTEXT.zone, motorClockOffsetMinutes: 0, closedInputs: 0, ...situation };
  return explainedDecision(decide(CONTEXT.settings, CONTEXT.traits, full), full.at);
}

describe('why this speed, to a homeowner', () => {
  const say = (subject: Explained): string => explain(subject, CONTEXT, HOMEOWNER);

  it.each<[Explained, string]>([
    [decided('18:00'), 'The evening program runs at 1,400 rpm until 10 PM.'],
    [decided('12:00'), 'The day program runs at 1,725 rpm until 5 PM.'],
    [decided('23:30'), 'Your pump is off until 6 AM.'],
    [decided('12:00', { closedInputs: 1 }), 'Time clock 1 runs the cleaner at 2,850 rpm.'],
    [decided('12:00', { closedInputs: 2 }), 'The heater control asks for 2,400 rpm.'],
    [
      decided('06:00', { prime: { since: day('06:00'), claimed: false } }),
      'Your pump is priming until 6:05 AM: it fills itself with water before it settles.',
    ],
    [decided('12:00', { keypadRpm: 2000 }), 'Someone set 2,000 rpm on the motor’s keypad.'],
    [decided('12:00', { timedSince: day('11:45') }), 'A timed run at 3,200 rpm ends at 12:30 PM.'],
    [
      decided('23:00', { freezeSince: day('23:00') }),
      'It is cold outside, so freeze protection keeps the water moving at 1,150 rpm; it looks again at midnight.',
    ],
    [decided('12:00', { stopped: true }), 'Your pump was stopped on its keypad. It may start again by itself.'],
    [decided('12:00', { fault: { code: 'E7' } }), 'The motor reports a fault (E7) and stands.'],
  ])('%#', (subject, sentence) => {
    expect(say(subject)).toBe(sentence);
  });

  it('says so where the motor does something else', () => {
    const input = decided('12:00', { closedInputs: 1 });
    expect(say({ ...input, source: 'program', rpm: 1725 })).toBe(
      'Your pump runs at 1,725 rpm, where 2,850 rpm is expected.',
    );
    expect(say({ ...input, source: 'off', rpm: 0 })).toBe('Your pump stands still, where 2,850 rpm is expected.');
    expect(say({ ...decided('23:30'), source: 'unknown', rpm: 900 })).toBe(
      'Your pump runs at 900 rpm, where it is expected to be off.',
    );
    expect(say({ ...input, source: 'no-data' })).toBe('There is no word from your pump.');
  });

  it('never says that a closed input keeps the pump from being shut off', () => {
    const sentences = Object.entries(ENGLISH_MESSAGES).filter(
      ([key]) => key.startsWith('homeowner.') || key.startsWith('next.'),
    );
    for (const [, sentence] of sentences) expect(sentence).not.toMatch(/cannot|can't|prevent|lock|shut/i);
    const locked = decided('12:00', { closedInputs: 1 });
    expect(locked.lockedBy).toBe(1);
    const never = { ...CONTEXT, traits: { ...CONTEXT.traits, stopBeatsInputs: false } };
    expect(explain(locked, never, HOMEOWNER)).toBe('Time clock 1 runs the cleaner at 2,850 rpm.');
  });
});

describe('why this speed, to a technician', () => {
  const say = (subject: Explained): string => explain(subject, CONTEXT, TECHNICIAN);

  it.each<[Explained, string]>([
    [decided('18:00'), 'Program entry 2 (5 PM to 10 PM): 1,400 rpm until 10 PM.'],
    [
      decided('12:00', { closedInputs: 3 }),
      'Input 1 (time clock 1, cleaner) closed: 2,850 rpm until it opens. Closed too, at no higher speed: 2. The keypad’s speed keys do nothing while it is closed.',
    ],
    [
      decided('06:00', { prime: { since: day('06:00'), claimed: false } }),
      'Priming at 3,450 rpm until 6:05 AM, then program.',
    ],
    [decided('12:00', { timedSince: day('11:45') }), 'Timed high-speed run: 3,200 rpm until 12:30 PM.'],
    [decided('12:00', { fault: { code: undefined } }), 'Drive fault; the motor stands.'],
    [decided('23:30'), 'Nothing is due until 6 AM; the motor is off.'],
  ])('%#', (subject, sentence) => {
    expect(say(subject)).toBe(sentence);
  });

  it('names what is due and what was measured where they differ', () => {
    const input = decided('12:00', { closedInputs: 2 });
    expect(say({ ...input, source: 'program', rpm: 1725 })).toBe(
      'Input 2 (the heater control) closed: 2,400 rpm until it opens. The keypad’s speed keys do nothing while it is closed. Measured 1,725 rpm (program).',
    );
    expect(say({ ...decided('18:00'), source: 'off', rpm: 0 })).toBe(
      'Program entry 2 (5 PM to 10 PM): 1,400 rpm until 10 PM. The motor stands.',
    );
  });

  it('says what would be due without a keypad stop, and that the stop is no isolation', () => {
    const stop: Explained = { ...decided('18:00', { stopped: true }), expectedSource: 'program', expectedRpm: 1400 };
    expect(say(stop)).toBe(
      'Keypad stop. It is not isolation: another clock, freeze protection or the program can start it. Without the stop 1,400 rpm (program) would be due.',
    );
  });

  it('says where a model’s keypad stop does not beat a closed input', () => {
    const context = { ...CONTEXT, traits: { ...CONTEXT.traits, stopBeatsInputs: false } };
    const sentence = explain(decided('12:00', { closedInputs: 1 }), context, TECHNICIAN);
    expect(sentence).toMatch(/On this model the keypad’s stop does not stop it either\.$/);
  });

  it('uses the 24-hour clock and another locale’s separators where asked', () => {
    expect(explain(decided('18:00'), CONTEXT, { voice: 'technician', hour12: false, locale: 'de-DE' })).toBe(
      'Program entry 2 (17:00 to 22:00): 1.400 rpm until 22:00.',
    );
  });

  it('speaks another catalogue where one is given', () => {
    const messages = { ...ENGLISH_MESSAGES, 'short.program.until': '{part} bis {until}', 'part.evening': 'abends' };
    expect(explainShort(decided('18:00'), CONTEXT, { ...TECHNICIAN, hour12: false, messages })).toBe(
      'Abends bis 22:00',
    );
  });
});

describe('why this speed, in a row of the fleet', () => {
  const say = (subject: Explained): string => explainShort(subject, CONTEXT, TECHNICIAN);

  it.each<[Explained, string]>([
    [decided('18:00'), 'Evening program until 10 PM'],
    [decided('12:00'), 'Day program until 5 PM'],
    [decided('12:00', { closedInputs: 1 }), 'Input 1 closed: cleaner, until it opens'],
    [decided('12:00', { closedInputs: 2 }), 'Input 2 closed, until it opens'],
    [decided('23:30'), 'Off until 6 AM'],
    // A motor's clock a minute or two off is right for people; half an hour is not.
    [decided('23:30', { motorClockOffsetMinutes: -1.4 }), 'Off until 6 AM'],
    [decided('18:00', { motorClockOffsetMinutes: 3 }), 'Evening program until 10 PM'],
    [decided('23:30', { motorClockOffsetMinutes: -32 }), 'Off until 6:32 AM'],
    [decided('12:00', { keypadRpm: 900 }), 'On manual at the keypad'],
    [decided('12:00', { stopped: true }), 'Keypad stop'],
    [{ ...decided('12:00', { closedInputs: 1 }), source: 'program', rpm: 1725 }, 'Input 1 closed, runs program speed'],
    [{ ...decided('12:00', { closedInputs: 1 }), source: 'unknown', rpm: 2000 }, 'Input 1 closed, runs 2,000 rpm'],
    [{ ...decided('12:00'), source: 'off', rpm: 0 }, 'Day program due, stands'],
    [{ ...decided('23:30'), source: 'program', rpm: 1400 }, 'Nothing due, runs program speed'],
    [{ ...decided('12:00'), source: 'no-data' }, 'No data'],
  ])('%#', (subject, words) => {
    expect(say(subject)).toBe(words);
  });

  it('names the weekday of a change over a day away', () => {
    const mondays = {
      ...CONTEXT.settings,
      program: [entry('06:00', '20:00', 1700, [true, false, false, false, false, false, false])],
    };
    const situation = { at: day('12:00'), zone: CONTEXT.zone, motorClockOffsetMinutes: 0, closedInputs: 0 };
    const off = explainedDecision(decide(mondays, CONTEXT.traits, situation), situation.at);
    expect(say(off)).toBe('Off until Monday 6 AM');
  });
});

describe('what comes next', () => {
  const where = { zone: CONTEXT.zone, motorClockOffsetMinutes: 0 };
  const runs = plan(
    CONTEXT.settings,
    CONTEXT.traits,
    where,
    day('18:00'),
    day('18:00') + 86_400_000,
    recordedWindows(CONTEXT.inputs),
  );

  it('is told in order, with tomorrow where it is', () => {
    const said = runs.slice(1).map((run) => explainNext(run, day('18:00'), CONTEXT, HOMEOWNER));
    expect(said).toEqual([
      'At 10 PM the pump switches off.',
      'Tomorrow at 6 AM the pump starts.',
      'Tomorrow at 6:05 AM the day program takes over at 1,725 rpm.',
      'Tomorrow at 10 AM time clock 1 starts the cleaner.',
      'Tomorrow at 2 PM the day program takes over at 1,725 rpm.',
      'Tomorrow at 5 PM the evening program takes over at 1,400 rpm.',
    ]);
  });
});

describe('what comes next by a clock that is a minute off', () => {
  it('is told by the program’s own times', () => {
    const where = { zone: CONTEXT.zone, motorClockOffsetMinutes: -1 };
    const runs = plan(CONTEXT.settings, CONTEXT.traits, where, day('18:00'), day('18:00') + 43_200_000, []);
    expect(runs.slice(1).map((run) => explainNext(run, day('18:00'), CONTEXT, HOMEOWNER))[0]).toBe(
      'At 10 PM the pump switches off.',
    );
  });
});

describe('a stored run', () => {
  const run: Run = {
    from: day('17:00'),
    to: day('22:00'),
    source: 'program',
    expectedSource: 'program',
    closedInputs: 0,
    activeInput: 0,
    expectedRpm: 1400,
    meanRpm: 1401.3,
    meanWatts: 168,
    wattHours: 840,
    coveredMs: 18_000_000,
    gallons: undefined,
    flags: [],
  };
  const say = (more: Partial<Run>, voice: 'homeowner' | 'technician' = 'technician'): string =>
    explain(explainedRun({ ...run, ...more }, day('19:00'), CONTEXT, 0), CONTEXT, { ...TECHNICIAN, voice });

  it('is explained at any instant within it', () => {
    expect(say({}, 'homeowner')).toBe('The evening program runs at 1,401 rpm until 10 PM.');
    expect(
      say({
        expectedSource: 'input',
        source: 'input',
        closedInputs: 3,
        activeInput: 1,
        expectedRpm: 2850,
        meanRpm: 2849,
      }),
    ).toMatch(
      /^Input 1 \(time clock 1, cleaner\) closed: 2,849 rpm until it opens\. Closed too, at no higher speed: 2\./,
    );
    expect(say({ source: 'no-data', meanRpm: 0 })).toBe('No readings.');
    expect(say({ source: 'stop', meanRpm: 0 })).toMatch(
      /^Keypad stop\..* Without the stop 1,400 rpm \(program\) would be due\.$/,
    );
    expect(say({ source: 'unknown', meanRpm: 2000 })).toMatch(/Measured 2,000 rpm \(unknown\)\.$/);
    expect(say({ source: 'prime', expectedSource: 'prime', meanRpm: 3450, to: undefined })).toMatch(
      /^Priming at 3,450 rpm/,
    );
  });
});

describe('any explanation', () => {
  const kinds: Because[] = [
    { kind: 'input', input: 3, others: [1, 2] },
    { kind: 'program', entry: 0, fromMinute: 1320, toMinute: 60 },
    { kind: 'prime', endsAt: 0, next: 'off' },
    { kind: 'timed', endsAt: 0 },
    { kind: 'fault', code: undefined },
    ...(['keypad', 'stop', 'freeze', 'off', 'unknown', 'no-data'] as const).map((kind) => ({ kind })),
  ];
  const sources = fc.constantFrom(...SOURCES, 'no-data' as const, 'unknown' as const);

  it('is a full sentence without a hole in it', () => {
    const subjects = fc.record({
      at: fc.constant(day('12:00')),
      rpm: fc.integer({ min: 0, max: 3450 }),
      source: sources,
      expectedSource: sources,
      expectedRpm: fc.integer({ min: 0, max: 3450 }),
      because: fc.constantFrom(...kinds),
      until: fc.option(fc.integer({ min: day('12:00'), max: day('12:00') + 9 * 86_400_000 }), { nil: undefined }),
      lockedBy: fc.constantFrom(undefined, 1),
    });
    fc.assert(
      fc.property(subjects, fc.constantFrom(HOMEOWNER, TECHNICIAN), (subject, options) => {
        const sentence = explain(subject, CONTEXT, options);
        expect(sentence).toMatch(/^[A-Z0-9].*\.$/);
        expect(sentence).not.toMatch(/undefined|NaN|[{}]| {2}| [.,]|\(\)/);
        expect(explainShort(subject, CONTEXT, options)).toMatch(/^[A-Z0-9].*[^.]$/);
      }),
      { numRuns: 500 },
    );
  });
});
