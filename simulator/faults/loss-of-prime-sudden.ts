import { cleanBasket, disturbWater } from '#simulator/pad-deeds.ts';
import { type Fault, MINUTE_MS } from './fault.ts';
import { isUnloaded } from './pump-view.ts';

export const lossOfPrimeSudden: Fault = {
  slug: 'loss-of-prime-sudden',
  detector: 'loss-of-prime',
  cause: 'sudden',
  story: 'A skimmer weir jams while the pump runs: it swallows air and runs dry at speed.',
  hours: [1, 6],
  needs: { stretchMs: 12 * MINUTE_MS },
  also: ['failed-prime', 'energized-without-flow', 'low-load', 'too-little-water', 'stopped'],
  suits: ({ settings, purpose }) => purpose === 'filter' && settings.program.some((entry) => entry.rpm >= 1600),
  begin: (pump, at) => {
    pump.conditions.suction.gulps = 'sudden';
    disturbWater(pump, at);
  },
  end: (pump, at) => {
    pump.conditions.suction.gulps = 'no';
    cleanBasket(pump, at, 3 * MINUTE_MS, 'breaker');
    disturbWater(pump, at);
  },
  shows: (pump, at) => pump.command.source !== 'prime' && pump.shaft.targetRpm >= 1500 && isUnloaded(pump, at),
};
