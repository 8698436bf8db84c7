import { type Fault, HOUR_MS } from './fault.ts';
import { isSettled, loadOfClean, wattsShareAtValve } from './pump-view.ts';

/** Friction left when the bypass is open. */
const FACTOR = 0.14;

export const bypassOpen: Fault = {
  slug: 'bypass-open',
  detector: 'high-load',
  cause: 'bypass',
  story: 'Someone opened the bypass around the heater: more water, more watts, none of it heated.',
  hours: [20, 120],
  needs: { stretchMs: 3 * HOUR_MS },
  also: [],
  // Only where the way through is narrow enough that opening it shows.
  suits: (spec) => spec.purpose === 'filter' && wattsShareAtValve(spec, FACTOR) > 1.2,
  begin: (pump) => {
    pump.conditions.valve = FACTOR;
  },
  end: (pump) => {
    pump.conditions.valve = 1;
  },
  shows: (pump, at) => isSettled(pump, at) && pump.command.source !== 'prime' && loadOfClean(pump, at) > 1.16,
};
