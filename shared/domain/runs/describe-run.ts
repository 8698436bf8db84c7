import { judgeSource } from '../control/judge-source.ts';
import type { MotorSettings } from '../control/motor-settings.ts';
import { speedTolerance } from '../control/speed-tolerance.ts';
import type { Run, RunFlag } from './run.ts';
import type { Departure, OpenRun } from './run-fold-state.ts';
import { addSums, emptySums, type RunSums, settledMean } from './run-sums.ts';

const HOUR_MS = 3_600_000;
/** A volume is stated where the flow was known for this much of the time covered. */
const ENOUGH_FLOW = 0.9;

/**
 * The open run as it stands, open (`to` undefined) or ending at `to`. A departure still under way counts as part of
 * it. The source is judged from the settled speed; on manual the expected speed is the measured one.
 */
export function describeRun(
  open: OpenRun,
  departure: Departure | null,
  to: number | undefined,
  settings: MotorSettings,
): Run {
  const sums = emptySums();
  addSums(sums, open);
  if (departure !== null) addSums(sums, departure);
  const settledRpm = open.settled ? (settledMean(open) ?? open.firstRpm) : undefined;
  const meanRpm = settledRpm ?? (sums.coveredMs > 0 ? sums.rpmMs / sums.coveredMs : open.firstRpm);
  const onManual = open.dueSource === 'keypad';
  const expectedRpm = onManual ? meanRpm : open.dueRpm;
  return {
    from: open.from,
    to,
    source: settledRpm === undefined ? open.decisionSource : judgedSource(open, settledRpm, settings),
    expectedSource: open.dueSource,
    closedInputs: open.closedInputs,
    activeInput: open.activeInput,
    expectedRpm,
    meanRpm,
    meanWatts: sums.coveredMs > 0 ? sums.wattMs / sums.coveredMs : open.firstWatts,
    wattHours: sums.wattMs / HOUR_MS,
    coveredMs: sums.coveredMs,
    gallons: isFlowKnown(sums) ? sums.gallons : undefined,
    gallonsSigma: isFlowKnown(sums) ? sums.gallonsSigma : undefined,
    flags: flagsOf(open, settledRpm, expectedRpm),
  };
}

const isFlowKnown = ({ gallonsMs, coveredMs }: RunSums): boolean =>
  gallonsMs > 0 && gallonsMs >= ENOUGH_FLOW * coveredMs;

/** A gap: nothing is known of it but what was last seen before. */
export function describeGap(open: OpenRun, from: number, to: number): Run {
  return {
    from,
    to,
    source: 'no-data',
    expectedSource: open.dueSource,
    closedInputs: open.closedInputs,
    activeInput: open.activeInput,
    expectedRpm: open.dueSource === 'keypad' ? 0 : open.dueRpm,
    meanRpm: 0,
    meanWatts: 0,
    wattHours: 0,
    coveredMs: 0,
    gallons: undefined,
    gallonsSigma: undefined,
    flags: [],
  };
}

function judgedSource(open: OpenRun, rpm: number, settings: MotorSettings): Run['source'] {
  const reading = { closedInputs: open.closedInputs, reportedSource: open.reported ?? undefined };
  const onManual = open.decisionSource === 'keypad' && rpm > 0;
  const decision = { source: open.decisionSource, rpm: onManual ? rpm : open.decisionRpm };
  return judgeSource(rpm, reading, { decision, due: { source: open.dueSource, rpm: open.dueRpm } }, settings);
}

function flagsOf(open: OpenRun, settledRpm: number | undefined, expectedRpm: number): RunFlag[] {
  if (settledRpm === undefined) return ['ramp-only', ...open.flags];
  const off = Math.abs(settledRpm - expectedRpm) > speedTolerance(expectedRpm);
  return off ? ['off-expected', ...open.flags] : [...open.flags];
}
