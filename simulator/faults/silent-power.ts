import { setTimeClocks } from '#simulator/pad-deeds.ts';
import { cutPower } from '#simulator/power.ts';
import { addDeed } from '#simulator/pump.ts';
import { type Fault, HOUR_MS } from './fault.ts';

export const silentPower: Fault = {
  slug: 'silent-power',
  detector: 'silent',
  cause: 'power',
  story: 'The power is out; somebody goes round afterwards and sets the clocks.',
  hours: [1.5, 5],
  needs: { stretchMs: 1.25 * HOUR_MS },
  also: ['clock-shift', 'motor-clock', 'stopped', 'missing-input', 'stuck-input'],
  suits: () => true,
  begin: (pump, at, until) => {
    cutPower(pump, at, until, 'street');
    addDeed(pump, until + pump.chance.between(0.5, 3) * HOUR_MS, (restored, when) => setTimeClocks(restored, when));
  },
  end: () => undefined,
  shows: (pump) => !pump.powered,
};
