import { type Fault, HOUR_MS } from './fault.ts';
import { isSettled, loadOfClean } from './pump-view.ts';

export const pluggedBasket: Fault = {
  slug: 'plugged-basket',
  detector: 'low-load',
  cause: 'sudden',
  story: 'A windy hour fills the basket: the flow falls at once.',
  hours: [3, 40],
  needs: { stretchMs: HOUR_MS },
  also: ['too-little-water', 'loss-of-prime', 'failed-prime', 'energized-without-flow'],
  suits: ({ purpose, settings }) => purpose === 'filter' && settings.program.some((entry) => entry.rpm >= 1600),
  begin: (pump) => {
    pump.conditions.valve = pump.chance.between(7, 13);
  },
  end: (pump) => {
    pump.conditions.valve = 1;
    pump.dirt.basket = 1;
  },
  shows: (pump, at) => isSettled(pump, at) && pump.command.source !== 'prime' && loadOfClean(pump, at) < 0.76,
};
