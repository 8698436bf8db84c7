import { press } from '#simulator/pad-deeds.ts';
import { type Fault, HOUR_MS } from './fault.ts';

export const keypadHold: Fault = {
  slug: 'keypad-hold',
  detector: 'keypad-hold',
  cause: null,
  story: 'Somebody set a speed by hand, and it was never put back to its program.',
  hours: [28, 60],
  needs: { stretchMs: 20 * HOUR_MS },
  also: ['too-little-water'],
  suits: ({ settings }) => settings.program.length > 0,
  begin: (pump, at) => press(pump, { key: 'manual', rpm: 2250 }, at),
  end: (pump, at) => press(pump, { key: 'resume' }, at),
  shows: (pump) => pump.firmware.keypadRpm !== undefined,
};
