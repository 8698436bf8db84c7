import { cleanBasket, disturbWater } from '#simulator/pad-deeds.ts';
import type { Pump } from '#simulator/pump.ts';
import { type Fault, MINUTE_MS } from './fault.ts';
import { isUnloaded } from './pump-view.ts';

type PrimeFault = Pick<Fault, 'slug' | 'cause' | 'story'> & {
  /** What is wrong from now on; null when it is put right. */
  readonly trouble: (pump: Pump, wrong: boolean) => void;
  /** `keypad`: stopped for some minutes; `breaker`: the lid is just closed, and the breaker goes on in a few seconds. */
  readonly stoppedBy?: 'keypad' | 'breaker';
};

const BREAKER_MS = 6000;

/**
 * A pump that does not prime: something is wrong with its suction side, and it has to start. Whoever caused it has
 * just had the lid open; whoever cures it opens the lid, puts it right and starts it again.
 */
export function definePrimeFault({ slug, cause, story, trouble, stoppedBy = 'keypad' }: PrimeFault): Fault {
  return {
    slug,
    detector: 'failed-prime',
    cause,
    story,
    hours: [1, 9],
    needs: { stretchMs: 12 * MINUTE_MS },
    also: ['stopped', 'loss-of-prime', 'low-load', 'energized-without-flow', 'too-little-water', 'slow-prime'],
    suits: ({ settings, purpose }) => settings.prime !== null && purpose === 'filter',
    begin: (pump, at) => {
      trouble(pump, true);
      const forMs = stoppedBy === 'breaker' ? BREAKER_MS : pump.chance.between(2, 5) * MINUTE_MS;
      cleanBasket(pump, at, forMs, stoppedBy);
      disturbWater(pump, at);
    },
    end: (pump, at) => {
      trouble(pump, false);
      cleanBasket(pump, at, 3 * MINUTE_MS, 'breaker');
      disturbWater(pump, at);
    },
    shows: (pump, at) => pump.firmware.pausedUntil !== undefined || isUnloaded(pump, at),
  };
}
