import { disturbWater } from '#simulator/pad-deeds.ts';
import { waterFill } from '#simulator/physics/prime.ts';
import type { PumpSpec } from '#simulator/pump-spec.ts';
import type { Fault } from './fault.ts';

export const slowPrime: Fault = {
  slug: 'slow-prime',
  detector: 'slow-prime',
  cause: null,
  story: 'The lid seal is drying out: it primes still, but takes many times as long.',
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
    slownessOf(settings, suction.primeSeconds) >= 4,
  begin: (pump, at) => {
    pump.conditions.suction.slowness = slownessOf(pump.spec.settings, pump.spec.suction.primeSeconds);
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

/** So slow that a prime takes seven tenths of the time it is given. */
function slownessOf({ prime }: PumpSpec['settings'], primeSeconds: number): number {
  return (0.7 * (prime?.seconds ?? 0)) / primeSeconds;
}
