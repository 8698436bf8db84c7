import { cutPower } from '#simulator/power.ts';
import { addDeed } from '#simulator/pump.ts';
import { type Fault, MINUTE_MS } from './fault.ts';

/** How long the device was without power, and how much of that its clock did not count. */
const CUT_MS = 9 * MINUTE_MS;

export const skewedDevice: Fault = {
  slug: 'skewed-device',
  detector: 'clock-skew',
  cause: null,
  story: 'After a breaker trip the device’s own clock is minutes behind, and it stamps its readings with that.',
  hours: [3, 30],
  needs: { stretchMs: 10 * MINUTE_MS },
  also: ['silent', 'motor-clock', 'clock-shift'],
  suits: () => true,
  begin: (pump, at) => {
    const skewMs = Math.round(pump.chance.between(4, 8) * MINUTE_MS);
    cutPower(pump, at, at + CUT_MS, 'motor');
    addDeed(pump, at + CUT_MS, ({ conditions }) => {
      conditions.skewMs = skewMs;
    });
  },
  end: (pump) => {
    pump.conditions.skewMs = 0;
  },
  shows: (pump) => pump.powered && pump.conditions.skewMs > 0,
};
