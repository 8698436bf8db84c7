import { causeSaid } from './cause-said.ts';
import { CAUSE_WORDS, SIGN_WORDS } from './cause-words.data.ts';
import type { AlarmSurroundings } from './gather-signs.ts';
import type { CauseEvidence, CauseRanking, LikelyCause } from './likely-cause.ts';
import { type FoundCounts, rankCauses } from './rank-causes.ts';
import { type AlarmEvidence, signsOfEvidence } from './signs-of-evidence.ts';

/** An alarm as stored. `from` is when its condition began, ms. */
export type AlarmToExplain = AlarmEvidence & { readonly from: number };

/** One cause in its place with what it is, how a technician tells, and in words what speaks for and against it. */
export type WordedCause = LikelyCause & {
  readonly name: string;
  readonly check: string;
  readonly reasonsFor: readonly string[];
  readonly reasonsAgainst: readonly string[];
};

/** `causes` the likeliest first; `certain` is false where neither readings nor closed calls speak: then say so. */
export type WordedCauses = Omit<CauseRanking, 'causes'> & {
  readonly causes: readonly WordedCause[];
  readonly certain: boolean;
};

const wordOf = ({ sign, present }: CauseEvidence): string => SIGN_WORDS[sign][present ? 0 : 1];

/**
 * What may lie behind any alarm, the likeliest first: the alarm's own figures, what is known of the days before it
 * (all of `around` may be left out; `around.seen` wins over what the figures say) and what this company's closed calls
 * found for that detector.
 *
 * @example likelyCausesOf({ detector: 'failed-prime', cause: 'air-leak', from, evidence: { loadShare: 0.33 } }).causes[0]
 * // { rank: 1, cause: 'air-leak', name: 'Air leak on the suction side', reasonsFor: ['The load of air from …'], … }
 */
export function likelyCausesOf(
  alarm: AlarmToExplain,
  around: Omit<AlarmSurroundings, 'from'> = {},
  found: FoundCounts = {},
): WordedCauses {
  const seen = { ...signsOfEvidence(alarm), ...around.seen };
  const ranking = rankCauses(alarm.detector, causeSaid(alarm), { ...around, from: alarm.from, seen }, found);
  const causes = ranking.causes.map((cause) => ({
    ...cause,
    ...CAUSE_WORDS[cause.cause],
    reasonsFor: cause.evidenceFor.map(wordOf),
    reasonsAgainst: cause.evidenceAgainst.map(wordOf),
  }));
  return {
    ...ranking,
    causes,
    certain: causes[0]?.standing === 'likely' && !ranking.restsOn.includes('starting-guess'),
  };
}
