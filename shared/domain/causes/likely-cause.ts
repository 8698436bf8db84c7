import type { CauseSlug } from './cause-words.data.ts';
import type { Sign } from './sign.ts';

/**
 * A cause and how much it weighs. `guess` is the starting guess: how many of ten such alarms it is, before any call of
 * the company was closed. `signs` gives, for a sign that is there and for one that is not, how many times likelier the
 * cause becomes; 1 says nothing.
 */
export type CauseWeight = {
  readonly cause: CauseSlug;
  readonly guess: number;
  readonly signs: Readonly<Partial<Record<Sign, readonly [present: number, absent: number]>>>;
};

/** One sign that speaks for a cause or against it; `present` false: it is its absence that speaks. */
export type CauseEvidence = { readonly sign: Sign; readonly present: boolean };

/**
 * A cause in its place, with what speaks for it and against it: data for a sentence. `found` of `calls` closed calls of
 * this company found it; `guess` of ten is the starting guess that it was weighed with. There is no percentage: the
 * weights do not bear one.
 */
export type LikelyCause = {
  readonly rank: number;
  readonly cause: CauseSlug;
  readonly standing: 'likely' | 'possible' | 'unlikely';
  /** The detector itself named this cause from the readings. */
  readonly detectorSays: boolean;
  readonly evidenceFor: readonly CauseEvidence[];
  readonly evidenceAgainst: readonly CauseEvidence[];
  readonly found: number;
  readonly calls: number;
  readonly guess: number;
};

/** What the order rests on: signs of this alarm, the company's own closed calls, or nothing but the starting guess. */
export type CauseRanking = {
  readonly causes: readonly LikelyCause[];
  readonly restsOn: readonly ('signs' | 'closed-calls' | 'starting-guess')[];
  /** Who opened the lid last, where that was lately. */
  readonly lidOpened: { readonly by: string; readonly at: number; readonly daysBefore: number } | undefined;
};
