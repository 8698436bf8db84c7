import { disturbWater } from '#simulator/pad-deeds.ts';
import { type Fault, MINUTE_MS } from './fault.ts';
import { isSettled } from './pump-view.ts';

export const lossOfPrimeRagged: Fault = {
  slug: 'loss-of-prime-ragged',
  detector: 'loss-of-prime',
  cause: 'ragged',
  story: 'A crack in the suction line lets air in now and then: the watts will not hold still.',
  hours: [2, 20],
  needs: { stretchMs: 15 * MINUTE_MS },
  also: ['failed-prime', 'low-load', 'energized-without-flow', 'too-little-water'],
  suits: ({ settings, purpose }) => purpose === 'filter' && settings.program.some((entry) => entry.rpm >= 1600),
  begin: (pump, at) => {
    pump.conditions.suction.gulps = 'ragged';
    disturbWater(pump, at);
  },
  end: (pump, at) => {
    pump.conditions.suction.gulps = 'no';
    disturbWater(pump, at);
  },
  shows: (pump, at) => isSettled(pump, at) && pump.command.source !== 'prime' && pump.shaft.targetRpm >= 1500,
};
