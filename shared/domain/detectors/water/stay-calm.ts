import type { Facts } from '../facts.ts';

/**
 * Whether a load has looked usual without a break for so long, s. At another speed than the alarm's one reading near
 * the limit would be followed by one past it: only a stretch counts.
 */
export function staysCalm(state: { calmSince: number }, calm: boolean, { now }: Facts, seconds: number): boolean {
  if (!calm) state.calmSince = 0;
  else if (state.calmSince === 0) state.calmSince = now;
  return calm && now - state.calmSince >= seconds * 1000;
}
