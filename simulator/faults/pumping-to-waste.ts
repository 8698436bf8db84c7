import { type Fault, MINUTE_MS } from './fault.ts';
import { isSettled, loadOfClean, wattsShareAtValve } from './pump-view.ts';

/** Friction left on the way to the drain. */
const FACTOR = 0.07;
/** Watts in the end, as a share of the usual. */
const TAKEN_SHARE = 1.4;

export const pumpingToWaste: Fault = {
  slug: 'pumping-to-waste',
  detector: 'high-load',
  cause: 'to-waste',
  story: 'The valve was left at waste after the backwash: the pool is being pumped into the drain.',
  hours: [1, 6],
  needs: { stretchMs: 30 * MINUTE_MS },
  also: ['too-little-water'],
  // The water leaves by a short wide pipe; only where the way back was narrow do the watts show it.
  suits: (spec) => spec.purpose === 'filter' && wattsShareAtValve(spec, FACTOR) > 1.15,
  begin: (pump) => {
    pump.conditions.valve = FACTOR;
    // Far past its best point it cavitates, and takes more than its curve says.
    pump.conditions.rubbing = Math.max(0, TAKEN_SHARE / wattsShareAtValve(pump.spec, FACTOR) - 1);
  },
  end: (pump) => {
    pump.conditions.valve = 1;
    pump.conditions.rubbing = 0;
  },
  shows: (pump, at) => isSettled(pump, at) && pump.command.source !== 'prime' && loadOfClean(pump, at) > 1.3,
};
