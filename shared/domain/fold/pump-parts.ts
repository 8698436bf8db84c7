import { type Control, createControl } from '../control/create-control.ts';
import type { MotorSettings } from '../control/motor-settings.ts';
import type { PumpContext } from '../control/pump-context.ts';
import { listChangedSettings } from '../detectors/changed-settings.ts';
import { createMotorClockTracker, type MotorClockTracker } from '../detectors/clocks/motor-clock-tracker.ts';
import { createDetectorBank, type DetectorBank } from '../detectors/detector-bank.ts';
import type { DetectorParameters } from '../detectors/detector-parameters.ts';
import { DETECTOR_RULES } from '../detectors/detector-rules.ts';
import type { Facts } from '../detectors/facts.ts';
import { createInputTracker, type InputTracker } from '../detectors/inputs/input-tracker.ts';
import { createLinkTracker, type LinkTracker } from '../detectors/link/link-tracker.ts';
import { createLoadTracker, type LoadTracker } from '../detectors/load/load-tracker.ts';
import { isRecord, type Json } from '../detectors/plain-state.ts';
import { createReportedFit } from '../detectors/reported-fit.ts';
import { createRunFold, type RunFold } from '../runs/create-run-fold.ts';
import { type ControlCopy, copyAnswer } from './control-copy.ts';
import { createPadTracker, type PadTracker } from './pad-tracker.ts';
import { restoreReading, saveReading } from './reading-memory.ts';
import { createReadingPace, type ReadingPace } from './reading-pace.ts';
import { CONTROL_BEFORE_READINGS, READING_BEFORE_READINGS } from './resting-facts.ts';
import type { SavedPumpFold } from './saved-pump-fold.ts';
import { restoreSettings, saveSettings } from './settings-memory.ts';

/** Everything the fold of one pump is made of. */
export type PumpParts = {
  readonly parameters: DetectorParameters;
  readonly facts: Facts;
  /** What the facts show as control's answer. */
  readonly answer: ControlCopy;
  readonly control: Control;
  readonly inputs: InputTracker;
  readonly load: LoadTracker;
  readonly link: LinkTracker;
  readonly motorClock: MotorClockTracker;
  readonly pad: PadTracker;
  readonly runs: RunFold;
  readonly bank: DetectorBank;
  readonly pace: ReadingPace;
  /** The stretch of one zone offset that holds the last reading. */
  readonly zone: { from: number; to: number; offsetMinutes: number };
  /** There has been a reading. */
  readonly seen: () => boolean;
  readonly hearSettings: (settings: Partial<MotorSettings>) => void;
  readonly save: () => { readonly hot: Json; readonly learnt: Json; readonly learntVersion: number };
};

/** Raised when what the rules remember changes its form: what another version remembered is then learnt anew. */
const RULES_VERSION = 1;

/** Builds the parts under commissioned data from what was saved. */
export function createPumpParts(
  commissioned: PumpContext,
  parameters: DetectorParameters,
  saved: SavedPumpFold | undefined,
): PumpParts {
  const hot = isRecord(saved?.hot) ? saved.hot : {};
  const learnt = isRecord(saved?.learnt) ? saved.learnt : {};
  const pace = createReadingPace(commissioned, hot.pace);
  const { context } = pace;
  const control = createControl(context, hot.control);
  const inputs = createInputTracker(context, hot.inputs, learnt.inputs);
  const load = createLoadTracker(context, parameters['failed-prime'], hot.load, learnt.load);
  const link = createLinkTracker(context, hot.link);
  const motorClock = createMotorClockTracker(context, control, hot.motorClock);
  const pad = createPadTracker(context, hot.pad);
  const runs = createRunFold(context, hot.runs);
  const bank = createDetectorBank(
    DETECTOR_RULES,
    parameters,
    hot.rules === RULES_VERSION ? hot.detectors : undefined,
    hot.rules === RULES_VERSION ? learnt.detectors : undefined,
  );
  const before = restoreReading(hot.reading);
  const answer: ControlCopy = { ...CONTROL_BEFORE_READINGS };
  const answered = control.answer();
  if (answered !== undefined) copyAnswer(answer, answered);
  const facts: Facts = {
    kind: 'time',
    now: 0,
    receivedAt: 0,
    context,
    reading: before ?? READING_BEFORE_READINGS,
    single: false,
    elapsedMs: 0,
    gap: false,
    reportsSource: hot.reportsSource === true,
    control: answer,
    inputs: inputs.facts,
    load: load.facts,
    link: link.facts,
    motorClock: motorClock.facts,
    localDay: 0,
    localWeekday: 0,
    localMinute: 0,
    zoneOffsetMinutes: 0,
    padState: pad.state(),
    onSite: pad.onSite(),
    onSiteEndedAt: pad.onSiteEndedAt(),
    reportedSettings: restoreSettings(learnt.reported),
    changedSettings: [],
    fitsReported: () => false,
    stands: bank.stands,
  };
  facts.fitsReported = createReportedFit(facts);
  facts.changedSettings = listChangedSettings(facts.reportedSettings, context.settings);
  let settingsHeard = 0;
  const changes = (): number => load.learntVersion() + inputs.learntVersion() + bank.learntVersion() + settingsHeard;
  const versionBefore = (typeof learnt.version === 'number' ? learnt.version : 0) - changes();
  let kept: { readonly version: number; readonly learnt: Json } | undefined;

  function learntNow(): { readonly version: number; readonly learnt: Json } {
    const version = versionBefore + changes();
    if (kept?.version !== version) {
      const reported = saveSettings(facts.reportedSettings);
      kept = {
        version,
        learnt: {
          version,
          load: load.saveLearnt(),
          inputs: inputs.saveLearnt(),
          detectors: bank.saveLearnt(),
          reported,
        },
      };
    }
    return kept;
  }

  return {
    parameters,
    facts,
    answer,
    control,
    inputs,
    load,
    link,
    motorClock,
    pad,
    runs,
    bank,
    pace,
    zone: { from: 0, to: 0, offsetMinutes: 0 },
    seen: () => facts.reading !== READING_BEFORE_READINGS,
    hearSettings: (settings) => {
      const before = JSON.stringify(facts.reportedSettings);
      facts.reportedSettings = { ...facts.reportedSettings, ...settings };
      facts.changedSettings = listChangedSettings(facts.reportedSettings, context.settings);
      if (JSON.stringify(facts.reportedSettings) !== before) settingsHeard += 1;
    },
    save: () => {
      const { version, learnt: learntJson } = learntNow();
      const hotJson: Json = {
        ...(facts.reading === READING_BEFORE_READINGS ? {} : { reading: saveReading(facts.reading) }),
        control: control.save(),
        runs: parseSaved(runs.save()),
        load: load.saveHot(),
        inputs: inputs.saveHot(),
        link: link.save(),
        motorClock: motorClock.save(),
        pad: pad.save(),
        pace: pace.save(),
        rules: RULES_VERSION,
        detectors: bank.saveHot(),
        reportsSource: facts.reportsSource,
      };
      return { hot: hotJson, learnt: learntJson, learntVersion: version };
    },
  };
}

/** Runs hold optional fields, which JSON leaves out. */
function parseSaved(state: object): Json {
  return JSON.parse(JSON.stringify(state)) as Json;
}
