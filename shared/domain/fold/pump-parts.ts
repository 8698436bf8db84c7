import type { MotorSettings } from '../control/motor-settings.ts';
import type { PumpContext } from '../control/pump-context.ts';
import { listChangedSettings } from '../detectors/changed-settings.ts';
import type { DetectorParameters } from '../detectors/detector-parameters.ts';
import type { Facts } from '../detectors/facts.ts';
import { isRecord, type Json } from '../detectors/plain-state.ts';
import { type ControlCopy, copyAnswer } from './control-copy.ts';
import { initialFacts } from './initial-facts.ts';
import {
  createPumpTrackers,
  learntChanges,
  type PumpTrackers,
  saveHotTrackers,
  saveLearntTrackers,
} from './pump-trackers.ts';
import { saveReading } from './reading-memory.ts';
import { CONTROL_BEFORE_READINGS, READING_BEFORE_READINGS } from './resting-facts.ts';
import type { SavedPumpFold } from './saved-pump-fold.ts';
import { saveSettings } from './settings-memory.ts';

export type PumpSave = { readonly hot: Json; readonly learnt: Json; readonly learntVersion: number };

/** Everything the fold of one pump is made of. */
export type PumpParts = PumpTrackers & {
  readonly parameters: DetectorParameters;
  readonly facts: Facts;
  /** What the facts show as control's answer. */
  readonly answer: ControlCopy;
  /** The stretch of one zone offset that holds the last reading. */
  readonly zone: { from: number; to: number; offsetMinutes: number };
  /** There has been a reading. */
  readonly seen: () => boolean;
  readonly hearSettings: (settings: Partial<MotorSettings>) => void;
  readonly save: () => PumpSave;
};

/** Builds the parts under commissioned data from what was saved. */
export function createPumpParts(
  commissioned: PumpContext,
  parameters: DetectorParameters,
  saved: SavedPumpFold | undefined,
): PumpParts {
  const hot = isRecord(saved?.hot) ? saved.hot : {};
  const learnt = isRecord(saved?.learnt) ? saved.learnt : {};
  const trackers = createPumpTrackers(commissioned, parameters, hot, learnt);
  const answer: ControlCopy = { ...CONTROL_BEFORE_READINGS };
  const answered = trackers.control.answer();
  if (answered !== undefined) copyAnswer(answer, answered);
  const facts = initialFacts(trackers, answer, hot, learnt);
  const seen = (): boolean => facts.reading !== READING_BEFORE_READINGS;
  if (seen()) trackers.water.resume(facts);
  const settings = createReportedSettings(facts);
  const keep = createLearntKeeper(typeof learnt.version === 'number' ? learnt.version : 0, trackers, settings);
  return {
    ...trackers,
    parameters,
    facts,
    answer,
    zone: { from: 0, to: 0, offsetMinutes: 0 },
    seen,
    hearSettings: settings.hear,
    save: () => ({
      hot: {
        ...(seen() ? { reading: saveReading(facts.reading) } : {}),
        ...saveHotTrackers(trackers),
        reportsSource: facts.reportsSource,
      },
      ...keep(),
    }),
  };
}

type ReportedSettings = {
  readonly hear: (settings: Partial<MotorSettings>) => void;
  readonly changes: () => number;
  readonly save: () => Json;
};

/** Keeps what the motor says it is set to; a report may name only some of it. */
function createReportedSettings(facts: Facts): ReportedSettings {
  let changes = 0;
  return {
    hear: (settings) => {
      const before = JSON.stringify(facts.reportedSettings);
      facts.reportedSettings = { ...facts.reportedSettings, ...settings };
      facts.changedSettings = listChangedSettings(facts.reportedSettings, facts.context.settings);
      if (JSON.stringify(facts.reportedSettings) !== before) changes += 1;
    },
    changes: () => changes,
    save: () => saveSettings(facts.reportedSettings),
  };
}

/** Writes the learnt state out only when it changed; the version goes on from the saved one. */
function createLearntKeeper(
  savedVersion: number,
  trackers: PumpTrackers,
  settings: ReportedSettings,
): () => { readonly learnt: Json; readonly learntVersion: number } {
  const changes = (): number => learntChanges(trackers) + settings.changes();
  const before = savedVersion - changes();
  let kept: { readonly learnt: Json; readonly learntVersion: number } | undefined;
  return () => {
    const version = before + changes();
    if (kept?.learntVersion !== version) {
      const learnt = { version, ...saveLearntTrackers(trackers), reported: settings.save() };
      kept = { learnt, learntVersion: version };
    }
    return kept;
  };
}
