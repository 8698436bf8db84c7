import type { Reading } from '../readings/reading.ts';
import type { ControlState } from './control-state.ts';
import { PRIME_GRACE_SECONDS } from './decide.ts';
import type { MotorSettings } from './motor-settings.ts';
import type { Situation } from './situation.ts';
import { fitsSpeed } from './speed-tolerance.ts';

type PrimeSettings = MotorSettings['prime'];

/**
 * The start whose prime counts: the one seen, or the one due while the shaft stands. Where a start may have been
 * missed, it is the first reading since, as long as the shaft turns at the prime's speed and the motor names no other source. A prime that is claimed long
 * after that start belongs to one between two readings: the breaker was off for a moment.
 */
export function findPrimeStart(
  prime: PrimeSettings,
  state: ControlState,
  reading: Reading,
  baseRpm: number,
): Situation['prime'] {
  if (prime === null) return undefined;
  const claimed = reading.reportedSource === 'prime';
  const seen = state.standing ? (state.dueSince ?? state.primeSaidSince) : state.startedAt;
  const mayPrime = reading.reportedSource === undefined || claimed;
  const primes = mayPrime && (claimed || (fitsSpeed(reading.rpm, prime.rpm) && !fitsSpeed(reading.rpm, baseRpm)));
  const said = claimed ? state.primeSaidSince : null;
  const restarted = said !== null && seen !== null && said >= seen + longestPrimeMs(prime) ? said : seen;
  const since = primes ? (state.assumedSince ?? restarted) : seen;
  return since !== null && reading.at < since + longestPrimeMs(prime) ? { since, claimed } : undefined;
}

function longestPrimeMs({ seconds }: { readonly seconds: number }): number {
  return (seconds + PRIME_GRACE_SECONDS) * 1000;
}

/** Gives up the assumption of a missed start once the settled speed, or the time since, speaks against it. */
export function reviewAssumedStart(prime: PrimeSettings, state: ControlState, reading: Reading, baseRpm: number): void {
  if (state.assumedSince === null) return;
  const over = prime === null || reading.at >= state.assumedSince + longestPrimeMs(prime);
  const elsewhere =
    fitsSpeed(reading.rpm, baseRpm) || (prime !== null && state.rampOver && !fitsSpeed(reading.rpm, prime.rpm));
  if (over || (elsewhere && reading.reportedSource !== 'prime')) state.assumedSince = null;
}
