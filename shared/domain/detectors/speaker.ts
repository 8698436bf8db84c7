import type { DetectorInstance, Finding } from './define-detector.ts';
import { type AlarmClass, type AlarmSignal, type Evidence, isWorse, type Priority } from './detector.ts';
import { DETECTOR_CLASSES } from './detector-classes.data.ts';
import type { Facts } from './facts.ts';
import type { Standing } from './standing.ts';

/** One detector of one pump, and how far its alarm has come. */
export type Speaker = {
  readonly instance: DetectorInstance;
  readonly standing: Standing;
  /** What somebody chose as its usual priority. */
  readonly priority: Priority | undefined;
};

type Words = { readonly alarmClass: AlarmClass; readonly priority: Priority; readonly cause: string };

/** The instant that counts for a detector, ms: device time, or arrival for what goes by arrival. */
export const nowOf = ({ instance }: Speaker, facts: Facts): number =>
  instance.byArrival ? facts.receivedAt : facts.now;

function wordsOf(speaker: Speaker, { alarmClass, priority, cause }: Finding): Words {
  const usual = DETECTOR_CLASSES[speaker.instance.detector];
  const found = priority ?? usual.priority;
  return {
    alarmClass: alarmClass ?? usual.alarmClass,
    priority: choosePriority(found, usual.priority, speaker.priority),
    cause,
  };
}

/** A choice replaces the usual priority; a worse one that the rule finds by itself (frost, hours of standing) stays. */
function choosePriority(found: Priority, usual: Priority, chosen: Priority | undefined): Priority {
  if (chosen === undefined) return found;
  if (found === usual) return chosen;
  return isWorse(chosen, found) ? chosen : found;
}

/** Raises the alarm, and says so. */
export function raiseSignal(speaker: Speaker, facts: Facts): AlarmSignal {
  const { standing, instance } = speaker;
  const finding = instance.describe(facts, { raised: false, onset: standing.onset, from: standing.onset });
  const words = wordsOf(speaker, finding);
  const at = nowOf(speaker, facts);
  Object.assign(standing, words, { raisedAt: at, from: finding.from ?? standing.onset, saidAt: at });
  const { evidence } = finding;
  return { type: 'raised', detector: instance.detector, ...words, from: standing.from, at, evidence };
}

/**
 * Looks again at an alarm that stands; undefined where class, priority and cause are as they were. What was once known
 * is not taken back because one reading cannot tell.
 */
export function findChange(speaker: Speaker, facts: Facts): AlarmSignal | undefined {
  const { standing, instance } = speaker;
  const finding = instance.describe(facts, { raised: true, onset: standing.onset, from: standing.from });
  const found = wordsOf(speaker, finding);
  const at = nowOf(speaker, facts);
  standing.saidAt = at;
  const words = found.cause.startsWith('unknown') ? { ...found, cause: standing.cause } : found;
  const { alarmClass, priority, cause } = standing;
  if (words.cause === cause && words.priority === priority && words.alarmClass === alarmClass) return undefined;
  Object.assign(standing, words);
  const { evidence } = finding;
  return { type: 'changed', detector: instance.detector, ...words, from: standing.from, at, evidence };
}

/** Says that the alarm is over, since when, and what else there is to say. */
export function clearSignal(speaker: Speaker, facts: Facts, because: Evidence): AlarmSignal {
  const at = nowOf(speaker, facts);
  const { normalSince } = speaker.standing;
  const evidence = { normalSince: normalSince === 0 ? at : normalSince, ...because };
  return { type: 'cleared', detector: speaker.instance.detector, at, evidence };
}
