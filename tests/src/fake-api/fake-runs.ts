import type { DemoMotorModel, DemoPad, DemoPump } from '#shared/contract/demo/demo-company.ts';
import type { Run } from '#shared/contract/http/runs.ts';
import { type PlannedRun, plan } from '#shared/domain/control/plan.ts';
import { recordedWindows } from '#shared/domain/control/window-spans.ts';
import { HOUR_MS } from '#shared/domain/time/local-time.ts';
import type { FakeFault } from './fake-faults.data.ts';

/** Watts of a wet end at a speed, near enough to look at. */
export const wattsAt = (rpm: number): number => (rpm < 40 ? 6 : Math.round(30 + 1420 * (rpm / 3450) ** 2.9));

export function planFakePump(
  pad: DemoPad,
  pump: DemoPump,
  model: DemoMotorModel,
  from: number,
  to: number,
): PlannedRun[] {
  const context = { zone: pad.zone, motorClockOffsetMinutes: 0 };
  return plan(pump.settings, model.traits, context, from, to, recordedWindows(pump.inputs));
}

const asRun = (planned: PlannedRun, index: number): Run => {
  const rpm = planned.rpm === 0 ? 0 : planned.rpm + ((index * 7) % 9) - 4;
  const watts = wattsAt(rpm);
  return {
    from: planned.from,
    to: planned.to,
    source: planned.source,
    expectedSource: planned.source,
    closedInputs: planned.closedInputs,
    activeInput: planned.activeInput,
    expectedRpm: planned.rpm,
    meanRpm: rpm,
    meanWatts: watts,
    wattHours: (watts * (planned.to - planned.from)) / HOUR_MS,
    coveredMs: planned.to - planned.from,
    gallons: null,
    flags: [],
  };
};

type Spoil = (run: Run) => Run[];

const off = (run: Run): Run => ({
  ...run,
  source: 'off',
  meanRpm: 0,
  meanWatts: 6,
  wattHours: 0,
  flags: ['off-expected'],
});

const SPOILERS: Readonly<Record<NonNullable<FakeFault['runs']>, Spoil>> = {
  'program-speed': (run) => [
    {
      ...run,
      source: 'program',
      meanRpm: 1702,
      meanWatts: 312,
      expectedRpm: 2850,
      expectedSource: 'input',
      closedInputs: 1,
      activeInput: 1,
      flags: ['off-expected'],
    },
  ],
  standing: (run) => [
    { ...run, source: 'stop', meanRpm: 0, meanWatts: 6, wattHours: 0, expectedRpm: 1700, flags: ['off-expected'] },
  ],
  silent: (run) => [{ ...run, source: 'no-data', meanRpm: 0, meanWatts: 0, wattHours: 0, coveredMs: 0, flags: [] }],
  // Three tries of eighteen minutes with a rest between them, then nothing more.
  unprimed: (run) => {
    const tries = [0, 30, 60].map((minute): Run => {
      const from = run.from + minute * 60_000;
      return {
        ...run,
        from,
        to: from + 18 * 60_000,
        source: 'prime',
        expectedSource: 'prime',
        meanRpm: 3450,
        meanWatts: 412,
        expectedRpm: 3450,
        flags: ['unprimed'],
      };
    });
    const rests = [18, 48].map(
      (minute): Run => off({ ...run, from: run.from + minute * 60_000, to: run.from + (minute + 12) * 60_000 }),
    );
    const rest: Run = {
      ...off(run),
      from: run.from + 78 * 60_000,
      source: 'fault',
      expectedRpm: 0,
      flags: ['unprimed'],
    };
    return [...tries, ...rests, rest].sort((a, b) => a.from - b.from);
  },
};

/** What a pump did up to now: its plan, spoilt from the fault's beginning on. The last run is still open. */
export function runFakePump(planned: readonly PlannedRun[], fault: FakeFault | undefined, now: number): Run[] {
  const past = planned.filter(({ from }) => from < now).map(asRun);
  const since = fault?.runs === undefined ? undefined : now - fault.hoursAgo * HOUR_MS;
  const sound =
    since === undefined
      ? past
      : past.filter(({ from }) => from < since).map((run) => ({ ...run, to: Math.min(run.to ?? now, since) }));
  const last = past.at(-1);
  const spoilt =
    since === undefined || fault?.runs === undefined || last === undefined
      ? []
      : SPOILERS[fault.runs]({ ...last, from: since, to: null });
  const runs = [...sound, ...spoilt];
  const open = runs.at(-1);
  return open === undefined ? [] : [...runs.slice(0, -1), { ...open, to: null }];
}
