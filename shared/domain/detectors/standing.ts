import { ABNORMAL, type Judgement, NORMAL } from './judgement.ts';

/** How far one detector's alarm has come. Times ms, 0 = not. Plain JSON, kept between readings. */
export type Standing = {
  /** First abnormal event of the condition that is pending or raised. */
  onset: number;
  raisedAt: number;
  /** When the condition began, as it was said. */
  from: number;
  normalSince: number;
  judgedAt: number;
  saidAt: number;
  cause: string;
  priority: string;
  alarmClass: string;
};

export const RAISE = 1;
export const CLEAR = 2;
export const STANDS = 3;
export const NOTHING = 0;
export type Step = typeof RAISE | typeof CLEAR | typeof STANDS | typeof NOTHING;

/** After this long without a chance to judge, a standing alarm returns to normal by itself. */
export const LONGEST_UNJUDGED_MS = 3 * 86_400_000;

export const restingStanding = (): Standing => ({
  onset: 0,
  raisedAt: 0,
  from: 0,
  normalSince: 0,
  judgedAt: 0,
  saidAt: 0,
  cause: '',
  priority: '',
  alarmClass: '',
});

/** Forgets everything: the alarm is over, or its condition never lasted. */
export function rest(standing: Standing): void {
  Object.assign(standing, restingStanding());
}

/**
 * Moves an alarm on by one judgement. The on-delay counts from the first abnormal event, the off-delay from the first
 * normal one; what is not judged moves
 * nothing, but a pending condition not seen again for its own delay is forgotten.
 */
export function advance(
  standing: Standing,
  judgement: Judgement,
  now: number,
  delayMs: number,
  offDelayMs: number,
): Step {
  if (judgement === ABNORMAL) {
    if (standing.onset === 0) standing.onset = now;
    standing.normalSince = 0;
    standing.judgedAt = now;
    if (standing.raisedAt !== 0) return STANDS;
    return now - standing.onset >= delayMs ? RAISE : NOTHING;
  }
  if (standing.raisedAt === 0) {
    const forgotten = judgement === NORMAL || now - standing.judgedAt > Math.max(delayMs, 600_000);
    if (standing.onset !== 0 && forgotten) rest(standing);
    return NOTHING;
  }
  if (judgement === NORMAL) {
    if (standing.normalSince === 0) standing.normalSince = now;
    standing.judgedAt = now;
    return now - standing.normalSince >= offDelayMs ? CLEAR : STANDS;
  }
  return now - standing.judgedAt > LONGEST_UNJUDGED_MS ? CLEAR : STANDS;
}
