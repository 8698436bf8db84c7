import type { Priority } from '../detectors/detector.ts';
import type { AlarmLife } from './alarm-life.ts';

/** An alarm put before its operator: it became active and unacknowledged. Ends with the acknowledgement, if there is one. */
export type Annunciation = {
  readonly at: number;
  readonly priority: Priority;
  readonly acknowledgedAt: number | null;
  readonly escalated: boolean;
};

/** A stretch in which an alarm stood before its operator, acknowledged or not; `to` null = it still stands. */
export type Standing = { readonly from: number; readonly to: number | null };

/** An alarm set aside; `to` null = it still is. */
export type Aside = {
  readonly kind: 'shelved' | 'suppressed' | 'out-of-service';
  readonly from: number;
  readonly to: number | null;
  /** Whether a person is known to have done it and said why; Millrace's own suppression always is. */
  readonly explained: boolean;
};

/** What one alarm's changes mean for whoever had to look after it. */
export type LifeStory = {
  readonly life: AlarmLife;
  readonly annunciations: readonly Annunciation[];
  readonly standings: readonly Standing[];
  /** When its condition ended. */
  readonly returns: readonly number[];
  readonly asides: readonly Aside[];
};
