import type { RunSource, Source } from '../readings/reading.ts';

/** Why a motor runs the way it does: data for a sentence. `endsAt` in ms; `next` is the source that asked for the start. */
export type Because =
  | { readonly kind: 'input'; readonly input: number; readonly others: readonly number[] }
  | { readonly kind: 'program'; readonly entry: number; readonly fromMinute: number; readonly toMinute: number }
  | { readonly kind: 'prime'; readonly endsAt: number; readonly next: Source }
  | { readonly kind: 'timed'; readonly endsAt: number }
  | { readonly kind: 'keypad' | 'stop' | 'freeze' | 'off' }
  | { readonly kind: 'fault'; readonly code: string | undefined }
  | { readonly kind: 'unknown' | 'no-data' };

/**
 * What a motor should be doing. `rpm` is the expected speed; `lockedBy` the input number that the keypad cannot
 * override; `until` the instant (ms) at which this answer can next change by the clock alone.
 */
export type Decision = {
  readonly source: Source;
  readonly rpm: number;
  readonly lockedBy: number | undefined;
  readonly until: number | undefined;
  readonly because: Because;
};

export type { RunSource };
