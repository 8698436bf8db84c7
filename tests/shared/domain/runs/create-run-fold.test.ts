import { describe, expect, it } from 'vitest';
import { createControl } from '#shared/domain/control/create-control.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { createRunFold, type RunFold } from '#shared/domain/runs/create-run-fold.ts';
import { type Invented, inventedPump, reading, wall } from '../control/invented-pump.ts';

const day = (text: string): number => wall('America/Phoenix', `2025-07-01 ${text}`);

/** A pump without prime, with its control and runs. */
function pumpOf(given: Invented = {}) {
  const context = inventedPump({ ...given, settings: { prime: null, ...given.settings } });
  const control = createControl(context);
  const runs = createRunFold(context);
  const push = (next: Reading, gpm?: number): void =>
    runs.push(next, control.push(next), { gpm: gpm ?? -1, sigmaShare: 0.1 });
  /** Feeds a reading every ten seconds from one instant to before another. */
  const feed = (from: string, to: string, rpm: number, more: Partial<Reading> = {}, gpm?: number): void => {
    for (let at = day(from); at < day(to); at += 10_000) push(reading(at, rpm, more), gpm);
  };
  return { runs, push, feed };
}

/** The runs in short: from, to, source, what was expected, mean speed. */
function told(runs: RunFold): unknown[] {
  return runs
    .take()
    .map(({ from, to, source, expectedSource, meanRpm }) => [from, to, source, expectedSource, Math.round(meanRpm)]);
}

describe('a run', () => {
  it('opens when the expected speed, the source or the mask changes', () => {
    const { runs, feed } = pumpOf();
    feed('05:50', '06:00', 0);
    feed('06:00', '07:00', 1700);
    feed('07:00', '08:00', 1700, { closedInputs: 0b100 });
    feed('08:00', '09:00', 2400, { closedInputs: 0b010 });
    expect(told(runs)).toEqual([
      [day('05:50'), day('06:00'), 'off', 'off', 0],
      [day('06:00'), day('07:00'), 'program', 'program', 1700],
      [day('07:00'), day('08:00'), 'program', 'program', 1700],
      [day('08:00'), undefined, 'input', 'input', 2400],
    ]);
  });

  it('does not open for a ramp, and takes its mean from the settled speed', () => {
    const { runs, feed, push } = pumpOf();
    feed('06:00', '07:00', 1700);
    [1700, 1900, 2200, 2390, 2400].forEach((rpm, second) => {
      push(reading(day('07:00') + second * 1000, rpm, { closedInputs: 0b010 }));
    });
    feed('07:00:10', '08:00', 2400, { closedInputs: 0b010 });
    expect(told(runs)).toEqual([
      [day('06:00'), day('07:00'), 'program', 'program', 1700],
      [day('07:00'), undefined, 'input', 'input', 2400],
    ]);
  });

  it('opens where the speed left its mean by more than max(40 rpm, 2 %) for 60 s, back to when it left', () => {
    const { runs, feed } = pumpOf();
    feed('12:00', '13:00', 1700);
    feed('13:00', '13:01:10', 1900);
    expect(told(runs)).toEqual([
      [day('12:00'), day('13:00'), 'program', 'program', 1700],
      [day('13:00'), undefined, 'unknown', 'program', 1900],
    ]);
    expect(runs.current()?.flags).toEqual(['off-expected']);
  });

  it('goes on through a departure that is shorter, or within the tolerance', () => {
    const { runs, feed } = pumpOf();
    feed('12:00', '13:00', 1700);
    feed('13:00', '13:01', 1900);
    feed('13:01', '14:00', 1738);
    expect(told(runs)).toEqual([[day('12:00'), undefined, 'program', 'program', 1719]]);
  });

  it('is a gap without data where readings are over three intervals apart', () => {
    const { runs, feed } = pumpOf();
    feed('12:00', '13:00', 1700);
    feed('13:10', '13:20', 1700);
    const last = day('12:59:50');
    expect(told(runs)).toEqual([
      [day('12:00'), last, 'program', 'program', 1700],
      [last, day('13:10'), 'no-data', 'program', 0],
      [day('13:10'), undefined, 'program', 'program', 1700],
    ]);
  });

  it('takes the place of one that had only just opened when a gap begins there', () => {
    const { runs, feed, push } = pumpOf();
    feed('12:00', '12:10', 1700);
    push(reading(day('12:10'), 1700, { closedInputs: 1 }));
    expect(told(runs).at(-1)).toEqual([day('12:10'), undefined, 'input', 'input', 1700]);
    push(reading(day('13:00'), 1700));
    expect(told(runs).slice(0, -1)).toEqual([[day('12:10'), day('13:00'), 'no-data', 'input', 0]]);
  });

  it('is given out only when it changed', () => {
    const { runs, feed } = pumpOf();
    feed('12:00', '12:10', 1700);
    expect(runs.take()).toHaveLength(1);
    expect(runs.take()).toEqual([]);
    runs.flag('unprimed');
    expect(runs.take()[0]?.flags).toEqual(['unprimed']);
    runs.flag('unprimed');
    expect(runs.take()).toEqual([]);
  });

  it('that has not settled says so, and takes what is expected for its source', () => {
    const { runs, push } = pumpOf();
    push(reading(day('12:00'), 900));
    expect(runs.current()).toMatchObject({ source: 'program', flags: ['ramp-only'], meanRpm: 900, meanWatts: 300 });
  });

  it('is nobody’s before the first reading, and starts afresh from what cannot be read back', () => {
    const context = inventedPump();
    expect(createRunFold(context).current()).toBeUndefined();
    expect(createRunFold(context).take()).toEqual([]);
    for (const saved of [
      null,
      'x',
      {},
      { at: 1, rpm: 1, watts: 1, gpm: -1, open: {}, departure: null, finished: [], changed: true },
    ]) {
      expect(createRunFold(context, saved).current()).toBeUndefined();
    }
  });
});

describe('the source of a run', () => {
  const sourceOf = (rpm: number, more: Partial<Reading> = {}): unknown[] => {
    const { runs, feed } = pumpOf();
    feed('12:00', '12:10', rpm, more);
    const { source, expectedSource, flags } = runs.current() ?? {};
    return [source, expectedSource, flags];
  };

  it('is the program where a closed input is ignored', () => {
    expect(sourceOf(1700, { closedInputs: 1 })).toEqual(['program', 'input', ['off-expected']]);
  });

  it('is the input that is obeyed where a faster one is closed too', () => {
    expect(sourceOf(2400, { closedInputs: 0b11 })).toEqual(['input', 'input', ['off-expected']]);
  });

  it('is an input also where its contact is open and its speed runs', () => {
    expect(sourceOf(2850)).toEqual(['input', 'program', ['off-expected']]);
  });

  it('is unknown where the speed fits nothing', () => {
    expect(sourceOf(2000)).toEqual(['unknown', 'program', ['off-expected']]);
  });

  it('is off where the shaft stands, or the keypad stop or fault that holds it', () => {
    expect(sourceOf(0)).toEqual(['off', 'program', ['off-expected']]);
    expect(sourceOf(0, { reportedSource: 'stop' })).toEqual(['stop', 'program', ['off-expected']]);
    expect(sourceOf(0, { reportedSource: 'fault' })).toEqual(['fault', 'program', ['off-expected']]);
  });

  it('is the keypad on manual, where any speed is the expected one', () => {
    const { runs, feed } = pumpOf();
    feed('12:00', '13:00', 1234, { reportedSource: 'keypad' });
    feed('13:00', '14:00', 2600, { reportedSource: 'keypad' });
    expect(runs.take().map((run) => [run.from, run.source, run.expectedRpm, run.flags])).toEqual([
      [day('12:00'), 'keypad', 1234, []],
      [day('13:00'), 'keypad', 2600, []],
    ]);
  });
});

describe('the energy of a run', () => {
  it('is the trapezoid within, held up to the change, and nothing over a gap', () => {
    const { runs, push } = pumpOf();
    push(reading(day('12:00'), 1700, { watts: 300 }));
    push(reading(day('12:00:10'), 1700, { watts: 360 }));
    push(reading(day('12:00:20'), 1700, { watts: 900, closedInputs: 1 }));
    push(reading(day('12:00:30'), 2850, { watts: 1100, closedInputs: 1 }));
    push(reading(day('12:10'), 2850, { watts: 1100, closedInputs: 1 }));
    const [program, input, gap] = runs.take();
    expect(program?.wattHours).toBeCloseTo((330 * 10 + 360 * 10) / 3600, 9);
    expect(program).toMatchObject({ coveredMs: 20_000, meanWatts: 345 });
    expect(input?.wattHours).toBeCloseTo((1000 * 10) / 3600, 9);
    expect(gap).toMatchObject({ source: 'no-data', wattHours: 0, coveredMs: 0 });
  });

  it('is held up to the instant that a departure began at, once it turns out to be a run', () => {
    const { runs, feed } = pumpOf();
    feed('12:00', '13:00', 1700, { watts: 300 });
    feed('13:00', '13:02', 0, { watts: 6 });
    const [before, after] = runs.take();
    expect(before).toMatchObject({ to: day('13:00'), coveredMs: 3_600_000 });
    expect(before?.wattHours).toBeCloseTo(300, 9);
    expect(after?.wattHours).toBeCloseTo((6 * 110) / 3600, 9);
  });

  it('ends with the run when it is closed, and what lies over a gap is no data', () => {
    const { runs, feed } = pumpOf();
    feed('12:00', '13:00', 1700);
    runs.close(day('13:00'));
    expect(runs.take()).toMatchObject([{ to: day('13:00'), coveredMs: 3_600_000, wattHours: 300 }]);
    feed('13:00', '14:00', 1700);
    runs.close(day('15:00'));
    expect(runs.take()).toMatchObject([
      { to: day('13:59:50') },
      { source: 'no-data', from: day('13:59:50'), to: day('15:00') },
    ]);
    expect(runs.current()).toBeUndefined();
  });
});

describe('the water of a run', () => {
  it('is the flow over the time, where it was known for nine tenths of it', () => {
    const { runs, feed } = pumpOf();
    feed('12:00', '12:06', 1700);
    feed('12:06', '13:00', 1700, {}, 30);
    runs.close(day('13:00'));
    expect(runs.take()[0]?.gallons).toBeCloseTo(30 * 54, 6);
    feed('13:00', '13:10', 1700);
    feed('13:10', '14:00', 1700, {}, 30);
    expect(runs.current()?.gallons).toBeUndefined();
  });
});
