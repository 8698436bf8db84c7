import type { TransitionKind } from '../alarms/alarm-record.ts';
import type { Detector, Priority } from '../detectors/detector.ts';

/** A change of an alarm's state, ms; `by` = whether a person made it, `explained` = whether they said why. */
export type LifeChange = {
  readonly kind: TransitionKind;
  readonly at: number;
  readonly priority: Priority;
  readonly by: string | null;
  readonly explained: boolean;
};

/**
 * One stored alarm with all its changes, oldest first. Notes are no alarms (nobody must respond) and have no life here.
 * `operatorId` = the technician who answers for the pad; null = the desk alone.
 */
export type AlarmLife = {
  readonly alarmId: string;
  readonly pumpId: string | null;
  readonly detector: Detector;
  readonly operatorId: string | null;
  readonly changes: readonly LifeChange[];
};

/** What repeats: the same detector at the same pump; an alarm for several pumps is its own. */
export const keyOf = ({ alarmId, pumpId, detector }: Pick<AlarmLife, 'alarmId' | 'pumpId' | 'detector'>): string =>
  `${pumpId ?? alarmId} ${detector}`;
