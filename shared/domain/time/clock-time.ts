import { DAY_MINUTES } from './local-time.ts';

/**
 * The signed way round the clock from one time of day to another, in minutes, over -720 and up to 720; what is no
 * number comes back as NaN.
 *
 * @example clockDifference(1430, 10) // 20
 */
export function clockDifference(fromMinute: number, toMinute: number): number {
  const forward = (((toMinute - fromMinute) % DAY_MINUTES) + DAY_MINUTES) % DAY_MINUTES;
  return forward > DAY_MINUTES / 2 ? forward - DAY_MINUTES : forward;
}
