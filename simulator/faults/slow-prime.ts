import { disturbWater } from '#simulator/pad-deeds.ts';
import { waterFill } from '#simulator/physics/prime.ts';
import type { Fault } from './fault.ts';

export const slowPrime: Fault = {
  slug: 'slow-prime',
  detector: 'slow-prime',
  cause: null,
  story: 'The lid seal is drying out: it primes still, but takes four times as long.',
  hours: [6 * 24, 12 * 24],
  needs: { stretches: 7 },
  also: [],
  // It has to stand dry enough for a prime to take time, and still be done long before the prime time is over.
  suits: ({ settings, suction }) =>
    settings.prime !== null &&
    suction.restFill < 0.6 &&
    suction.primeSeconds >= 18 &&
    suction.primeSeconds * 5.6 < settings.prime.seconds,
  begin: (pump, at) => {
    pump.conditions.suction.slowness = 4;
    disturbWater(pump, at);
  },
  end: (pump, at) => {
    pump.conditions.suction.slowness = 1;
    disturbWater(pump, at);
  },
  shows: (pump, at) => pump.command.source === 'prime' && waterFill(pump.water, at) < 0.9,
};
