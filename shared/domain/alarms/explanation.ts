import type { PadState } from '../control/pump-context.ts';
import { CONSEQUENCES } from '../detectors/cause-chain.data.ts';
import { PAD_STATE_MUTES } from '../detectors/context-mutes.data.ts';
import { DETECTORS, type Detector, type Evidence } from '../detectors/detector.ts';
import { type AlarmRecord, type AlarmStep, isOpen, makeStep } from './alarm-record.ts';

const PAD_STATE = 'pad-state:';
const DETECTOR = 'detector:';

/**
 * What explains an alarm that its detector stopped speaking of: the pad's state or another alarm of the pump; undefined
 * where the evidence of its end names neither, and it simply returned.
 *
 * @example explanationOf({ padState: 'winterized' }) // 'pad-state:winterized'
 * @example explanationOf({ consequenceOf: 'stopped' }) // 'detector:stopped'
 */
export function explanationOf({ padState, consequenceOf }: Evidence): string | undefined {
  if (typeof padState === 'string') return `${PAD_STATE}${padState}`;
  return typeof consequenceOf === 'string' ? `${DETECTOR}${consequenceOf}` : undefined;
}

/** Whether a suppression by design is one of a pump's own: its pad's state or another of its alarms. */
export const isExplanation = (suppressedBy: string | null): boolean => partsOf(suppressedBy) !== undefined;

/**
 * A suppression taken apart; undefined for one that comes from elsewhere.
 *
 * @example partsOf('pad-state:winterized') // { padState: 'winterized' }
 */
export function partsOf(
  suppressedBy: string | null,
): { readonly padState: PadState } | { readonly detector: Detector } | undefined {
  if (suppressedBy?.startsWith(PAD_STATE)) {
    const padState = suppressedBy.slice(PAD_STATE.length);
    return padState in PAD_STATE_MUTES ? { padState: padState as PadState } : undefined;
  }
  const detector = DETECTORS.find((each) => `${DETECTOR}${each}` === suppressedBy);
  return detector === undefined ? undefined : { detector };
}

/** The pump as far as it explains alarms: its pad's state and the detectors whose alarms hold. */
export type PumpStanding = { readonly padState: PadState; readonly standing: ReadonlySet<Detector> };

/**
 * Ends a suppression that nothing explains any more: the alarm is then like any that has returned. Undefined while it is
 * still explained, and for one that was suppressed from elsewhere.
 *
 * @example endExplanation(hushed, { padState: 'open', standing: new Set() }, at)?.record.state // 'returned'
 */
export function endExplanation(record: AlarmRecord, pump: PumpStanding, at: number): AlarmStep | undefined {
  if (!isOpen(record) || !isExplanation(record.suppressedBy) || isExplained(record.detector, pump)) return undefined;
  const finished = record.state === 'acknowledged' || record.alarmClass === 'note';
  const state = finished ? 'normal' : record.state === 'latched' ? 'latched' : 'returned';
  return makeStep({ ...record, suppressedBy: null, state }, 'suppression-ended', at);
}

const isExplained = (detector: Detector, { padState, standing }: PumpStanding): boolean =>
  PAD_STATE_MUTES[padState].includes(detector) ||
  [...standing].some((other) => CONSEQUENCES[other]?.includes(detector) === true);
