import type { PumpEvent } from '../fold/pump-event.ts';
import { CAUSE_CHAIN, CONSEQUENCES, WAITS_FOR } from './cause-chain.data.ts';
import { ON_SITE_MUTES, PAD_STATE_MUTES } from './context-mutes.data.ts';
import type { DetectorFactory } from './define-detector.ts';
import type { AlarmSignal, Detector, Evidence } from './detector.ts';
import { detectorFailure } from './detector-failure.ts';
import type { DetectorParameters } from './detector-parameters.ts';
import type { Facts } from './facts.ts';
import { ABNORMAL, type Judgement, NORMAL } from './judgement.ts';
import { isRecord, type Json, restoreState, saveChanges } from './plain-state.ts';
import { clearSignal, findChange, nowOf, raiseSignal, type Speaker } from './speaker.ts';
import { advance, CLEAR, RAISE, rest, restingStanding, STANDS } from './standing.ts';

/** The detectors of one pump, in the order of the cause chain. */
export type DetectorBank = {
  /** Judges the event that the facts describe and adds what is said to `signals`; throws a DetectorFailure. */
  readonly judge: (facts: Facts, signals: AlarmSignal[]) => void;
  readonly stands: (detector: Detector) => boolean;
  readonly learntVersion: () => number;
  readonly saveHot: () => Json;
  readonly saveLearnt: () => Json;
};

type Slot = Speaker & {
  /** Somebody switched the rule off. */
  readonly isOff: boolean;
  readonly explainedBy: readonly Slot[];
  readonly waitsFor: readonly Slot[];
};

/** An alarm that stands is looked at again this often. */
const LOOK_AGAIN_MS = 60_000;

/**
 * Holds the given detectors for one pump, with what was saved of them.
 *
 * @example const bank = createDetectorBank(DETECTOR_RULES, resolveParameters(), undefined, undefined);
 */
export function createDetectorBank(
  factories: readonly DetectorFactory[],
  parameters: DetectorParameters,
  hot: unknown,
  learnt: unknown,
): DetectorBank {
  const slots = createSlots(factories, parameters, recordOf(hot), recordOf(learnt));
  const byName = new Map<Detector, Slot>(slots.map((slot) => [slot.instance.detector, slot]));
  const onReading = slots.filter(({ instance }) => instance.hears.includes('reading'));
  const byKind = new Map<PumpEvent['kind'], readonly Slot[]>();
  const heardBy = (kind: PumpEvent['kind']): readonly Slot[] => {
    const known = kind === 'reading' ? onReading : byKind.get(kind);
    if (known !== undefined) return known;
    const heard = slots.filter((slot) => slot.instance.hears.includes(kind));
    byKind.set(kind, heard);
    return heard;
  };
  // Rules ask at every reading what stands, and hardly ever does anything.
  let quiet = slots.every(isQuiet);
  return {
    judge: (facts, signals) => {
      let current: Slot | undefined;
      try {
        for (const slot of heardBy(facts.kind)) {
          current = slot;
          const judgement = slot.instance.judge(facts);
          const { onset, raisedAt } = slot.standing;
          if (!slot.isOff && judgement !== ABNORMAL && onset === 0 && raisedAt === 0) continue;
          if (slot.isOff) hush(slot, facts, signals);
          else settle(slot, judgement, facts, signals);
          if (slot.standing.raisedAt !== raisedAt) quiet = slots.every(isQuiet);
        }
      } catch (error) {
        throw current === undefined ? error : detectorFailure(current.instance.detector, error);
      }
    },
    stands: (detector) => !quiet && (byName.get(detector)?.standing.raisedAt ?? 0) !== 0,
    learntVersion: () => slots.reduce((sum, { instance }) => sum + (instance.learntVersion() ?? 0), 0),
    saveHot: () => saveHot(slots),
    saveLearnt: () => saveLearnt(slots),
  };
}

const recordOf = (value: unknown): Readonly<Record<string, unknown>> => (isRecord(value) ? value : {});

const isQuiet = ({ standing }: Slot): boolean => standing.raisedAt === 0;

function createSlots(
  factories: readonly DetectorFactory[],
  parameters: DetectorParameters,
  hot: Readonly<Record<string, unknown>>,
  learnt: Readonly<Record<string, unknown>>,
): Slot[] {
  const made = new Map<Detector, Slot>();
  for (const factory of factories) {
    const name = factory(parameters, undefined).detector;
    const { standing, state } = recordOf(hot[name]);
    const instance = factory(parameters, learnt[name] ?? state);
    const restored = restoreState(restingStanding(), standing);
    const { enabled = true, priority } = parameters.choices?.[instance.detector] ?? {};
    made.set(name, { instance, standing: restored, priority, isOff: !enabled, explainedBy: [], waitsFor: [] });
  }
  const find = (detector: Detector): Slot[] => {
    const slot = made.get(detector);
    return slot === undefined ? [] : [slot];
  };
  const ordered = CAUSE_CHAIN.flatMap(find);
  return ordered.map((slot) => {
    const name = slot.instance.detector;
    const explainers = CAUSE_CHAIN.filter((detector) => CONSEQUENCES[detector]?.includes(name));
    const linked = Object.assign(slot, {
      explainedBy: explainers.flatMap(find),
      waitsFor: (WAITS_FOR[name] ?? []).flatMap(find),
    });
    return linked;
  });
}

function saveHot(slots: readonly Slot[]): Json {
  const saved: { [key: string]: Json } = {};
  for (const { instance, standing } of slots) {
    const state = instance.learntVersion() === undefined ? instance.save() : undefined;
    const changed = saveChanges(restingStanding(), standing);
    const entry = {
      ...(state === undefined ? {} : { state }),
      ...(changed === undefined ? {} : { standing: changed }),
    };
    if (Object.keys(entry).length > 0) saved[instance.detector] = entry;
  }
  return saved;
}

function saveLearnt(slots: readonly Slot[]): Json {
  const saved: { [key: string]: Json } = {};
  for (const { instance } of slots) {
    const state = instance.learntVersion() === undefined ? undefined : instance.save();
    if (state !== undefined) saved[instance.detector] = state;
  }
  return saved;
}

/**
 * The pad's state, as evidence, where it mutes a detector: an alarm that stands is over then; undefined where it does
 * not.
 */
function endedBy(slot: Slot, { padState }: Facts): Evidence | undefined {
  return PAD_STATE_MUTES[padState].includes(slot.instance.detector) ? { padState } : undefined;
}

/** It would be no news: its cause stands, or one of ours is there. What has been said before goes on standing. */
function isNoNews({ explainedBy, instance }: Slot, { onSite }: Facts): boolean {
  if (onSite && ON_SITE_MUTES.includes(instance.detector)) return true;
  for (const { standing } of explainedBy) if (standing.raisedAt !== 0) return true;
  return false;
}

/** A rule that is switched off goes on learning; what stood is over. */
function hush(slot: Slot, facts: Facts, signals: AlarmSignal[]): void {
  if (slot.standing.raisedAt !== 0) signals.push(clearSignal(slot, facts, { ruleOff: true }));
  rest(slot.standing);
}

function settle(slot: Slot, judgement: Judgement, facts: Facts, signals: AlarmSignal[]): void {
  const { standing } = slot;
  const ended = endedBy(slot, facts);
  const stands = standing.raisedAt !== 0;
  if (ended !== undefined && stands) signals.push(clearSignal(slot, facts, ended));
  if (ended !== undefined || (!stands && isNoNews(slot, facts))) rest(standing);
  else move(slot, judgement, facts, signals);
}

function move(slot: Slot, judgement: Judgement, facts: Facts, signals: AlarmSignal[]): void {
  const { standing, instance } = slot;
  const now = nowOf(slot, facts);
  const delayMs = instance.delayMs(facts);
  if (facts.gap && standing.raisedAt === 0 && now - standing.judgedAt > delayMs) rest(standing);
  const step = advance(standing, judgement, now, delayMs, instance.offDelayMs(facts));
  if (step === CLEAR) {
    signals.push(clearSignal(slot, facts, judgement === NORMAL ? {} : { notJudgedAnyMore: true }));
    rest(standing);
  } else if (step === RAISE && slot.waitsFor.every((other) => other.standing.onset === 0)) {
    signals.push(raiseSignal(slot, facts));
  } else if (step === STANDS && now - standing.saidAt >= LOOK_AGAIN_MS && looksAgain(slot, judgement)) {
    const changed = findChange(slot, facts);
    if (changed !== undefined) signals.push(changed);
  }
}

function looksAgain({ instance }: Slot, judgement: Judgement): boolean {
  return judgement === ABNORMAL || (judgement === NORMAL && instance.looksAgainOnReturn);
}
