import { type Fault, MINUTE_MS } from './fault.ts';
import { isSettled, loadOfClean } from './pump-view.ts';

export const pumpingToWaste: Fault = {
  slug: 'pumping-to-waste',
  detector: 'high-load',
  cause: 'to-waste',
  story: 'The valve was left at waste after the backwash: the pool is being pumped into the drain.',
  hours: [1, 6],
  needs: { stretchMs: 30 * MINUTE_MS },
  also: ['too-little-water'],
  suits: ({ system, purpose }) => purpose === 'filter' && system.pipe + system.filter > 0.022,
  begin: (pump) => {
    pump.conditions.valve = 0.04;
    pump.conditions.rubbing = 0.06;
  },
  end: (pump) => {
    pump.conditions.valve = 1;
    pump.conditions.rubbing = 0;
  },
  shows: (pump, at) => isSettled(pump, at) && loadOfClean(pump, at) > 1.3,
};
