import { setTimeClocks } from '#simulator/pad-deeds.ts';
import type { Pump } from '#simulator/pump.ts';
import { defineClockShift } from './define-clock-shift.ts';

export const daylightSavingForgotten = {
  ...defineClockShift({
    slug: 'daylight-saving-forgotten',
    cause: 'daylight-saving',
    story: 'The wall clocks change and nobody sets the old time clock: it is an hour off.',
    hours: [150, 300],
    begin: (pump) => followDaylightSaving(pump, false),
  }),
  end: (pump: Pump, at: number) => {
    followDaylightSaving(pump, pump.spec.dialsKept);
    setTimeClocks(pump, at);
  },
};

function followDaylightSaving(pump: Pump, follows: boolean): void {
  for (const { clock } of pump.contacts) {
    if (clock !== undefined && clock.type !== 'electronic') clock.dial.knowsDaylightSaving = follows;
  }
}
