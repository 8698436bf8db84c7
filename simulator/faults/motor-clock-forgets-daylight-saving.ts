import { defineMotorClockFault } from './define-motor-clock-fault.ts';

export const motorClockForgetsDaylightSaving = defineMotorClockFault({
  slug: 'motor-clock-forgets-daylight-saving',
  cause: 'daylight-saving',
  story: 'The wall clocks change and the motor’s own clock does not.',
  hours: [170, 320],
  begin: (pump) => {
    pump.motorClock.knowsDaylightSaving = false;
  },
});
