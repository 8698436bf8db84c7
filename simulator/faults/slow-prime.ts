import { disturbWater } from '#simulator/pad-deeds.ts';
import { waterFill } from '#simulator/physics/prime.ts';
import { DAY_MS, type Fault } from './fault.ts';

export const slowPrime: Fault = {
  slug: 'slow-prime',
  detector: 'slow-prime',
  cause: 'air-leak',
  story: 'The lid seal is drying out: it primes still, but takes three times as long.',
  hours: [6 * 24, 12 * 24],
  needs: { stretches: 7 },
  also: [],
  // It has to stand dry enough for a prime to take time, and still be done long before the prime time is over.
  suits: ({ settings, suction }) =>
    settings.prime !== null &&
    suction.restFill < 0.6 &&
    suction.primeSeconds >= 18 &&
    suction.primeSeconds * 4 < settings.prime.seconds,
  begin: (pump, at, until) => {
    pump.conditions.suction.slowness = until - at > 2 * DAY_MS ? 3 : 2.5;
    disturbWater(pump, at);
  },
  end: (pump, at) => {
    pump.conditions.suction.slowness = 1;
    disturbWater(pump, at);
  },
  shows: (pump, at) => pump.command.source === 'prime' && waterFill(pump.water, at) < 0.9,
};
