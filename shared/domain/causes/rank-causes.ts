import type { Detector } from '../detectors/detector.ts';
import { CAUSE_WEIGHTS } from './cause-weights.data.ts';
import type { CauseSlug } from './cause-words.data.ts';
import { type AlarmSurroundings, findLidOpener, gatherSigns } from './gather-signs.ts';
import type { CauseEvidence, CauseRanking, CauseWeight, LikelyCause } from './likely-cause.ts';
import { SIGNS, type Signs } from './sign.ts';

/** How many closed calls of this company found each cause of one detector. */
export type FoundCounts = Readonly<Record<string, number>>;

/** The detector's own cause, where it is one of the table: it has looked at the readings already. */
const DETECTOR_SAYS = 6;
/** From this share of the best weight a cause is possible, under it unlikely. */
const POSSIBLE_SHARE = 0.3;
/** A best cause is called likely only when it outweighs the next by this. */
const CLEARLY_BEST = 1.5;

/** What a detector's own cause says of how it came about, where it is no cause of the table. */
const SIGNS_OF_CAUSE: Readonly<Record<string, Signs>> = {
  sudden: { sudden: true, slow: false },
  slow: { sudden: false, slow: true },
  ragged: { 'ragged-load': true },
  'all-inputs': { 'all-inputs': true },
  'one-input': { 'all-inputs': false },
  sag: { sudden: true },
};

/** A count that is no whole number from 0 counts as none. */
const countOf = (found: FoundCounts, cause: string): number => {
  const count = found[cause] ?? 0;
  return Number.isInteger(count) && count > 0 ? count : 0;
};

type Spoken = CauseEvidence & { readonly factor: number };

const listSpoken = (weight: CauseWeight, signs: Signs): Spoken[] =>
  SIGNS.flatMap((sign) => {
    const there = signs[sign];
    const [present, absent] = weight.signs[sign] ?? [1, 1];
    const factor = there === undefined ? 1 : there ? present : absent;
    return factor === 1 ? [] : [{ sign, present: there === true, factor }];
  });

/** The strongest first, so that a sentence may take the first two. */
const byStrength = (spoken: readonly Spoken[]): CauseEvidence[] =>
  [...spoken]
    .sort((left, right) => Math.abs(Math.log(right.factor)) - Math.abs(Math.log(left.factor)))
    .map(({ sign, present }) => ({ sign, present }));

type Weighed = Omit<LikelyCause, 'rank' | 'standing'> & { readonly weight: number };

function weighCause(rule: CauseWeight, signs: Signs, said: string, found: FoundCounts, calls: number): Weighed {
  const spoken = listSpoken(rule, signs);
  const count = countOf(found, rule.cause);
  const start = rule.guess + count;
  const detectorSays = said === rule.cause;
  const factor = spoken.reduce((product, one) => product * one.factor, detectorSays ? DETECTOR_SAYS : 1);
  return {
    cause: rule.cause,
    weight: start * factor,
    detectorSays,
    evidenceFor: byStrength(spoken.filter((one) => one.factor > 1)),
    evidenceAgainst: byStrength(spoken.filter((one) => one.factor < 1)),
    found: count,
    calls,
    guess: rule.guess,
  };
}

function standingOf(weight: number, place: number, best: number, next: number): LikelyCause['standing'] {
  if (place === 0) return weight >= CLEARLY_BEST * next ? 'likely' : 'possible';
  return weight >= POSSIBLE_SHARE * best ? 'possible' : 'unlikely';
}

/**
 * Ranks what may lie behind an alarm: starting guesses out of ten plus what this company's closed calls found for it,
 * times how far each known sign moves a cause, with the evidence for and against. `said` is the detector's own cause,
 * `found` the counts of closed calls by cause (anything else among them is left out, but counts as a call).
 *
 * @example rankCauses('failed-prime', 'air-leak', { from, lidOpened: { at, by: 'Ana' } }, { 'air-leak': 7, blocked: 1 })
 * // { causes: [{ rank: 1, cause: 'air-leak', standing: 'likely', evidenceFor: [{ sign: 'lid-opened', present: true }], … }], … }
 */
export function rankCauses(
  detector: Detector,
  said: string,
  around: AlarmSurroundings,
  found: FoundCounts = {},
): CauseRanking {
  const signs = { ...SIGNS_OF_CAUSE[said], ...gatherSigns(around) };
  const calls = Object.keys(found).reduce((sum, cause) => sum + countOf(found, cause), 0);
  const weighed = CAUSE_WEIGHTS[detector]
    .map((rule) => weighCause(rule, signs, said, found, calls))
    .sort((left, right) => right.weight - left.weight);
  const [best = 0, next = 0] = weighed.map(({ weight }) => weight);
  const causes = weighed.map(({ weight, ...cause }, place) => ({
    rank: place + 1,
    ...cause,
    standing: standingOf(weight, place, best, next),
  }));
  const spoke = causes.some(({ evidenceFor, evidenceAgainst }) => evidenceFor.length + evidenceAgainst.length > 0);
  const restsOn = [
    ...(spoke || causes.some(({ detectorSays }) => detectorSays) ? (['signs'] as const) : []),
    ...(calls > 0 ? (['closed-calls'] as const) : []),
  ];
  return {
    causes,
    restsOn: restsOn.length > 0 ? restsOn : ['starting-guess'],
    lidOpened: findLidOpener(around),
  };
}

/**
 * Every cause that a closed call of this detector may name as found, in the order of the starting guess.
 *
 * @example listFindings('failed-prime').includes('air-leak') // true
 */
export const listFindings = (detector: Detector): CauseSlug[] => CAUSE_WEIGHTS[detector].map(({ cause }) => cause);
