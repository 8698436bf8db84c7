import type { PumpEvent } from '../fold/pump-event.ts';
import type { AlarmClass, Evidence, Priority } from './detector.ts';
import type { FoldedDetector } from './detector-defaults.data.ts';
import type { DetectorFigures, DetectorParameters, RuleParameters } from './detector-parameters.ts';
import type { Facts } from './facts.ts';
import type { Judgement } from './judgement.ts';
import { type PlainState, restoreState, saveChanges } from './plain-state.ts';

/** What a rule says when it speaks. `from` where it is not the first abnormal reading. */
export type Finding = {
  readonly cause: string;
  readonly evidence: Evidence;
  readonly from?: number;
  readonly priority?: Priority;
  readonly alarmClass?: AlarmClass;
};

/** What the framework knows of the rule's alarm when it asks for a finding. */
export type Spoken = { readonly raised: boolean; readonly onset: number; readonly from: number };

/** A rule as written: pure functions over its own small state and the shared facts. */
export type DetectorRule<Name extends FoldedDetector, State extends PlainState> = {
  readonly detector: Name;
  /** Events on which it is judged. */
  readonly hears: readonly PumpEvent['kind'][];
  /** Whose time it goes by; device time unless stated. */
  readonly clock?: 'device' | 'arrival';
  /** Is asked for its finding also while the return to normal is awaited. */
  readonly looksAgainOnReturn?: boolean;
  /**
   * Where its memory changes a few times a day, not with every reading: how often it has. Such a memory is stored with
   * what is learnt.
   */
  readonly learntVersion?: (state: State) => number;
  readonly initial: () => State;
  /** Judges one event; changes only its own state; allocates nothing. */
  readonly judge: (state: State, facts: Facts, parameters: RuleParameters<Name>) => Judgement;
  /** The whole time from onset, s, where it is not `delaySeconds`. */
  readonly delaySeconds?: (state: State, facts: Facts, parameters: RuleParameters<Name>) => number;
  readonly offDelaySeconds?: (state: State, facts: Facts, parameters: RuleParameters<Name>) => number;
  /** Called when the alarm is raised and now and again while it stands. */
  readonly describe: (state: State, facts: Facts, parameters: RuleParameters<Name>, spoken: Spoken) => Finding;
};

/** A rule with the state and the figures of one pump. */
export type DetectorInstance = {
  readonly detector: FoldedDetector;
  readonly hears: readonly PumpEvent['kind'][];
  readonly byArrival: boolean;
  readonly looksAgainOnReturn: boolean;
  readonly judge: (facts: Facts) => Judgement;
  readonly delayMs: (facts: Facts) => number;
  readonly offDelayMs: (facts: Facts) => number;
  readonly describe: (facts: Facts, spoken: Spoken) => Finding;
  /** undefined where the memory is no learnt one. */
  readonly learntVersion: () => number | undefined;
  /** undefined while there is nothing to remember. */
  readonly save: () => PlainState | undefined;
};

export type DetectorFactory = (parameters: DetectorParameters, saved: unknown) => DetectorInstance;

/**
 * Makes a rule into something a pump can hold.
 *
 * @example const stopped = defineDetector({ detector: 'stopped', hears: ['reading'], initial, judge, describe });
 */
export function defineDetector<Name extends FoldedDetector, State extends PlainState>(
  rule: DetectorRule<Name, State>,
): DetectorFactory {
  return (parameters, saved) => {
    const all: DetectorFigures = parameters;
    const figures = all[rule.detector];
    const initial = rule.initial();
    const state = restoreState(rule.initial(), saved);
    const fixed = fixedDelays(figures);
    return {
      detector: rule.detector,
      hears: rule.hears,
      byArrival: rule.clock === 'arrival',
      looksAgainOnReturn: rule.looksAgainOnReturn ?? false,
      judge: (facts) => rule.judge(state, facts, figures),
      delayMs: (facts) => (rule.delaySeconds?.(state, facts, figures) ?? fixed.delay) * 1000,
      offDelayMs: (facts) => (rule.offDelaySeconds?.(state, facts, figures) ?? fixed.off) * 1000,
      describe: (facts, spoken) => rule.describe(state, facts, figures, spoken),
      learntVersion: () => rule.learntVersion?.(state),
      save: () => saveChanges(initial, state),
    };
  };
}

function fixedDelays(figures: object): { readonly delay: number; readonly off: number } {
  const numbers = new Map<string, unknown>(Object.entries(figures));
  const seconds = (key: string): number => {
    const value = numbers.get(key);
    return typeof value === 'number' ? value : 0;
  };
  return { delay: seconds('delaySeconds'), off: seconds('offDelaySeconds') };
}
