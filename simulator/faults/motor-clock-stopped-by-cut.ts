import { cutPower } from '#simulator/power.ts';
import { defineMotorClockFault } from './define-motor-clock-fault.ts';
import { MINUTE_MS } from './fault.ts';

export const motorClockStoppedByCut = defineMotorClockFault({
  slug: 'motor-clock-stopped-by-cut',
  cause: 'power-cut',
  story: 'The motor’s clock has no battery left: a breaker trip of half an hour or more made it slow by as much.',
  hours: [130, 240],
  begin: (pump, at) => {
    pump.motorClock.carryOverMs = 0;
    cutPower(pump, at, at + Math.round(pump.chance.between(25, 110) * MINUTE_MS), 'motor');
  },
});
