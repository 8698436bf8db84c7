import { cutPower } from '#simulator/power.ts';
import { defineClockShift } from './define-clock-shift.ts';
import { MINUTE_MS } from './fault.ts';

export const clockStoppedByCut = defineClockShift({
  slug: 'clock-stopped-by-cut',
  cause: 'power-cut',
  story: 'The power was out for an hour or two; the old clock stood still and is late by as much ever since.',
  hours: [110, 220],
  begin: (pump, at) => cutPower(pump, at, at + Math.round(pump.chance.between(40, 130) * MINUTE_MS), 'street'),
});
