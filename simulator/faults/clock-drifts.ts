import { letDrift } from '#simulator/clocks/dial.ts';
import { setTimeClocks } from '#simulator/pad-deeds.ts';
import { defineClockShift } from './define-clock-shift.ts';
import { MINUTE_MS } from './fault.ts';
import { getClockContact } from './pump-view.ts';

export const clockDrifts = {
  ...defineClockShift({
    slug: 'clock-drifts',
    cause: 'drift',
    story: 'A gear slips: the clock loses six minutes or so a day.',
    hours: [170, 260],
    begin: (pump, at) => {
      const perDay = pump.chance.between(5, 8) * (pump.chance.chance(0.7) ? -1 : 1);
      const dial = getClockContact(pump).clock?.dial;
      if (dial !== undefined) letDrift(dial, at, Math.round(perDay * MINUTE_MS));
    },
  }),
  end: (pump: Parameters<typeof setTimeClocks>[0], at: number) => {
    const dial = getClockContact(pump).clock?.dial;
    if (dial !== undefined) letDrift(dial, at, 0);
    setTimeClocks(pump, at);
  },
};
