import { clockDifference } from '../time/clock-time.ts';
import { localTime, MINUTE_MS } from '../time/local-time.ts';
import type { ExplainContext } from './explain-options.ts';

/** A motor's clock that is off by less is right as far as people are concerned. */
const RIGHT_MINUTES = 5;

/**
 * An instant (ms) as a person should hear it: where the motor's clock, a minute or two off, brings it near an edge of
 * the program, that edge; else as it is.
 *
 * @example spokenEdge(oneMinutePastFive, context) // five, where the program ends at five
 */
export function spokenEdge(at: number, { zone, settings }: Pick<ExplainContext, 'zone' | 'settings'>): number {
  const minute = localTime(zone, at)?.minute;
  if (minute === undefined) return at;
  const away = settings.program
    .flatMap(({ fromMinute, toMinute }) => [clockDifference(minute, fromMinute), clockDifference(minute, toMinute)])
    .toSorted((left, right) => Math.abs(left) - Math.abs(right))[0];
  return away === undefined || Math.abs(away) >= RIGHT_MINUTES ? at : at + away * MINUTE_MS;
}
