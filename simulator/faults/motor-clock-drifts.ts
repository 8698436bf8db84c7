import { letDrift } from '#simulator/clocks/dial.ts';
import { defineMotorClockFault } from './define-motor-clock-fault.ts';
import { MINUTE_MS } from './fault.ts';

export const motorClockDrifts = defineMotorClockFault({
  slug: 'motor-clock-drifts',
  cause: 'drift',
  story: 'The motor’s clock loses minutes every day.',
  hours: [220, 340],
  begin: (pump, at) => letDrift(pump.motorClock, at, -Math.round(pump.chance.between(4, 7) * MINUTE_MS)),
});
