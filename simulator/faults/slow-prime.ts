import { disturbWater } from '#simulator/pad-deeds.ts';
import { waterFill } from '#simulator/physics/prime.ts';
import type { PumpSpec } from '#simulator/pump-spec.ts';
import type { Fault } from './fault.ts';

export const slowPrime: Fault = {
  slug: 'slow-prime',
  detector: 'slow-prime',
  cause: null,
  story: 'The lid seal is drying out: it primes still, but takes six times as long.',
  hours: [6 * 24, 12 * 24],
  needs: { stretches: 7 },
  also: [],
  // It has to stand dry enough for a prime to take time, and still be done long before the prime time is over.
  suits: ({ settings, suction }) =>
    settings.prime !== null &&
    standsEveryNight(settings) &&
    suction.drainHours < 12 &&
    suction.restFill < 0.6 &&
    suction.primeSeconds >= 15 &&
    suction.primeSeconds * 10 < settings.prime.seconds,
  begin: (pump, at) => {
    pump.conditions.suction.slowness = 6.5;
    disturbWater(pump, at);
  },
  end: (pump, at) => {
    pump.conditions.suction.slowness = 1;
    disturbWater(pump, at);
  },
  shows: (pump, at) => pump.command.source === 'prime' && waterFill(pump.water, at) < 0.9,
};

/** Whether the program leaves it standing long enough every day to have to prime again. */
function standsEveryNight({ program }: PumpSpec['settings']): boolean {
  const minutes = program.map(({ fromMinute, toMinute }) => (toMinute - fromMinute + 1440) % 1440 || 1440);
  return program.length === 1 && (minutes[0] ?? 1440) <= 1100;
}
