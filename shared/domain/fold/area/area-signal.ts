import type { AlarmClass, Detector, Evidence, Priority } from '#shared/domain/detectors/detector.ts';

/**
 * What one alarm can speak for: pads that went silent together in one area, clocks that all missed a daylight-saving
 * shift, pads of one area that lost load within hours of one another, or our own link when devices everywhere drop at
 * once.
 */
export type AreaKind = 'area-silence' | 'daylight-saving' | 'load-fall' | 'own-link';

/**
 * What the fold over pumps says. `key` names the alarm for as long as it stands; `pumpIds` are those it speaks for, in
 * order of joining. While it stands, its pumps' own alarms of that detector are suppressed by design.
 */
export type AreaSignal = {
  readonly type: 'raised' | 'changed' | 'cleared';
  readonly key: string;
  readonly kind: AreaKind;
  readonly detector: Detector;
  readonly alarmClass: AlarmClass;
  readonly priority: Priority;
  readonly cause: string;
  readonly area: string | null;
  readonly pumpIds: readonly string[];
  /** When the condition began, and when the rule spoke, ms. */
  readonly from: number;
  readonly at: number;
  readonly evidence: Evidence;
};
