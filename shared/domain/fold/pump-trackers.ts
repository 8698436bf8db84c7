import { type Control, createControl } from '../control/create-control.ts';
import type { PumpContext } from '../control/pump-context.ts';
import { createMotorClockTracker, type MotorClockTracker } from '../detectors/clocks/motor-clock-tracker.ts';
import { createDetectorBank, type DetectorBank } from '../detectors/detector-bank.ts';
import type { DetectorParameters } from '../detectors/detector-parameters.ts';
import { DETECTOR_RULES } from '../detectors/detector-rules.ts';
import { createInputTracker, type InputTracker } from '../detectors/inputs/input-tracker.ts';
import { createLinkTracker, type LinkTracker } from '../detectors/link/link-tracker.ts';
import { createLoadTracker, type LoadTracker } from '../detectors/load/load-tracker.ts';
import type { Json } from '../detectors/plain-state.ts';
import { createWaterTracker, type WaterTracker } from '../detectors/water/water-tracker.ts';
import { createRunFold, type RunFold } from '../runs/create-run-fold.ts';
import { createPadTracker, type PadTracker } from './pad-tracker.ts';
import { createReadingPace, type ReadingPace } from './reading-pace.ts';

/** Everything that follows one pump: each keeps its own memory. */
export type PumpTrackers = {
  readonly pace: ReadingPace;
  readonly control: Control;
  readonly inputs: InputTracker;
  readonly load: LoadTracker;
  readonly water: WaterTracker;
  readonly link: LinkTracker;
  readonly motorClock: MotorClockTracker;
  readonly pad: PadTracker;
  readonly runs: RunFold;
  readonly bank: DetectorBank;
};

export type SavedRecord = Readonly<Record<string, unknown>>;

/** Raised when what the rules remember changes its form: what another version remembered is then learnt anew. */
const RULES_VERSION = 1;

/** The trackers of a pump under commissioned data, each going on from its part of what was saved. */
export function createPumpTrackers(
  commissioned: PumpContext,
  parameters: DetectorParameters,
  hot: SavedRecord,
  learnt: SavedRecord,
): PumpTrackers {
  const pace = createReadingPace(commissioned, hot.pace);
  const { context } = pace;
  const control = createControl(context, hot.control);
  const known = hot.rules === RULES_VERSION;
  return {
    pace,
    control,
    inputs: createInputTracker(context, hot.inputs, learnt.inputs),
    load: createLoadTracker(context, parameters['failed-prime'], hot.load, learnt.load),
    water: createWaterTracker(context, hot.water, learnt.water),
    link: createLinkTracker(context, hot.link),
    motorClock: createMotorClockTracker(context, control, hot.motorClock),
    pad: createPadTracker(context, hot.pad),
    runs: createRunFold(context, hot.runs),
    bank: createDetectorBank(
      DETECTOR_RULES,
      parameters,
      known ? hot.detectors : undefined,
      known ? learnt.detectors : undefined,
    ),
  };
}

/** How often any of them learnt something. */
export function learntChanges({ load, water, inputs, bank }: PumpTrackers): number {
  return load.learntVersion() + water.learntVersion() + inputs.learntVersion() + bank.learntVersion();
}

/** What changes with every reading, as plain JSON. */
export function saveHotTrackers(trackers: PumpTrackers): { readonly [key: string]: Json } {
  const { control, runs, load, water, inputs, link, motorClock, pad, pace, bank } = trackers;
  return {
    control: control.save(),
    runs: parseJson(runs.save()),
    load: load.saveHot(),
    water: water.saveHot(),
    inputs: inputs.saveHot(),
    link: link.save(),
    motorClock: motorClock.save(),
    pad: pad.save(),
    pace: pace.save(),
    rules: RULES_VERSION,
    detectors: bank.saveHot(),
  };
}

/** What is learnt and seldom changes, as plain JSON. */
export function saveLearntTrackers({ load, water, inputs, bank }: PumpTrackers): { readonly [key: string]: Json } {
  return {
    load: load.saveLearnt(),
    water: water.saveLearnt(),
    inputs: inputs.saveLearnt(),
    detectors: bank.saveLearnt(),
  };
}

/** Runs hold optional fields, which JSON leaves out. */
function parseJson(state: object): Json {
  return JSON.parse(JSON.stringify(state)) as Json;
}
