import type { AlarmClass, Detector, Priority } from '../detectors/detector.ts';

/** An alarm as a rule would have raised it; `to` null = it still stood at the end. */
export type RaisedAlarm = {
  readonly detector: Detector;
  readonly alarmClass: AlarmClass;
  readonly priority: Priority;
  readonly cause: string;
  /** When the condition began, when the rule spoke, when it was over, ms. */
  readonly from: number;
  readonly raised: number;
  readonly to: number | null;
};

/** `gone` = raised by today's rule only, `new` = by the proposed one only. */
export type Difference = 'same' | 'changed' | 'gone' | 'new';

/** One alarm under today's rule and under the proposed one, whichever there is. */
export type ComparedAlarm = {
  readonly difference: Difference;
  readonly before: RaisedAlarm | null;
  readonly after: RaisedAlarm | null;
};

/** Conditions that began this close to one another are one, whatever a delay makes of them, ms. */
const SAME_BEGINNING_MS = 60_000;

/**
 * Sets what two versions of the rules raised on one pump side by side, in order of time. Two alarms of one detector are
 * the same where their conditions began together or they stood at the same time; each has one partner at most.
 *
 * @example compareAlarms([alarm], []) // [{ difference: 'gone', before: alarm, after: null }]
 */
export function compareAlarms(before: readonly RaisedAlarm[], after: readonly RaisedAlarm[]): ComparedAlarm[] {
  const left = new Set(after);
  const partners = new Map<RaisedAlarm, RaisedAlarm>();
  for (const isPartner of [beganTogether, stoodTogether]) {
    for (const alarm of before) {
      if (partners.has(alarm)) continue;
      const partner = after.find((other) => left.has(other) && isPartner(alarm, other));
      if (partner === undefined) continue;
      partners.set(alarm, partner);
      left.delete(partner);
    }
  }
  const compared = [
    ...before.map((alarm) => compareOne(alarm, partners.get(alarm) ?? null)),
    ...[...left].map((alarm): ComparedAlarm => ({ difference: 'new', before: null, after: alarm })),
  ];
  return compared.sort((a, b) => beginningOf(a) - beginningOf(b));
}

function compareOne(before: RaisedAlarm, after: RaisedAlarm | null): ComparedAlarm {
  if (after === null) return { difference: 'gone', before, after };
  const keys = ['alarmClass', 'priority', 'cause', 'raised', 'to'] as const;
  return { difference: keys.every((key) => before[key] === after[key]) ? 'same' : 'changed', before, after };
}

const beginningOf = ({ before, after }: ComparedAlarm): number => (before ?? after)?.from ?? 0;

const beganTogether = (one: RaisedAlarm, other: RaisedAlarm): boolean =>
  one.detector === other.detector && Math.abs(one.from - other.from) <= SAME_BEGINNING_MS;

const stoodTogether = (one: RaisedAlarm, other: RaisedAlarm): boolean =>
  one.detector === other.detector && one.from < (other.to ?? Infinity) && other.from < (one.to ?? Infinity);

/**
 * How many alarms that a person answered with "nothing to do" a rule would have raised.
 *
 * @example countNeedless([answered], []) // 0: the rule would have spared them
 */
export const countNeedless = (answered: readonly RaisedAlarm[], raised: readonly RaisedAlarm[]): number =>
  answered.filter((alarm) => raised.some((other) => beganTogether(alarm, other) || stoodTogether(alarm, other))).length;
