import { setDial } from '#simulator/clocks/dial.ts';
import type { PumpSpec } from '#simulator/pump-spec.ts';
import { type Fault, MINUTE_MS } from './fault.ts';
import { dialErrorMs } from './pump-view.ts';

type MotorClockFault = Pick<Fault, 'slug' | 'cause' | 'story' | 'hours' | 'begin'>;

/** The motor's own clock shows the wrong time until somebody sets it. */
export function defineMotorClockFault(fault: MotorClockFault): Fault {
  return {
    detector: 'motor-clock',
    needs: { days: 5 },
    also: ['silent', 'stopped', 'unexpected-run', 'wrong-speed', 'clock-shift', 'too-little-water'],
    suits: hasProgramEdges,
    end: (pump, at) => {
      setDial(pump.motorClock, pump.zone, at, 0);
      pump.motorClock.carryOverMs = pump.spec.motorClock.survivesCuts ? Number.POSITIVE_INFINITY : 0;
      pump.motorClock.knowsDaylightSaving = pump.spec.motorClock.knowsDaylightSaving;
      pump.motorClock.driftMsPerDay = 0;
    },
    shows: (pump, at) => pump.powered && Math.abs(dialErrorMs(pump, pump.motorClock, at)) > 15 * MINUTE_MS,
    ...fault,
  };
}

/** Whether anything happens by the motor's clock that a reader could see. */
function hasProgramEdges({ settings }: PumpSpec): boolean {
  return settings.program.some(({ fromMinute, toMinute }) => (toMinute - fromMinute + 1440) % 1440 !== 0);
}
