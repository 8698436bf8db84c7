import { type SystemCurve, type SystemState, systemFeet } from './system-curve.ts';
import { headFeet, type WetEnd } from './wet-end.ts';

/**
 * The flow, gpm, at which pump and system agree; 0 when the pump cannot lift the static head. Found by halving a
 * bracket, which cannot diverge: the pump's head falls with the flow and the system's rises.
 */
export function dutyGpm(wetEnd: WetEnd, curve: SystemCurve, state: SystemState, rpm: number): number {
  const excess = (gpm: number) => headFeet(wetEnd, gpm, rpm) - systemFeet(curve, state, gpm);
  if (rpm <= 0 || excess(0) <= 0) return 0;
  let low = 0;
  let high = wetEnd.bestGpm * 3 * (rpm / wetEnd.referenceRpm);
  for (let step = 0; step < 34; step += 1) {
    const middle = (low + high) / 2;
    if (excess(middle) > 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
