import { setTimeClocks } from '#simulator/pad-deeds.ts';
import type { PumpSpec } from '#simulator/pump-spec.ts';
import { type Fault, MINUTE_MS } from './fault.ts';
import { dialErrorMs } from './pump-view.ts';

/** From here on a rule takes notice. */
const NOTICEABLE_MS = 15 * MINUTE_MS;

type ClockShift = Pick<Fault, 'slug' | 'cause' | 'story' | 'hours' | 'begin'> & Partial<Pick<Fault, 'suits'>>;

/** A pad's mechanical clocks show the wrong time until somebody sets them. */
export function defineClockShift(shift: ClockShift): Fault {
  return {
    detector: 'clock-shift',
    needs: { days: 4 },
    also: ['silent', 'stopped', 'missing-input', 'stuck-input', 'motor-clock', 'too-little-water'],
    suits: hasStoppableClock,
    end: (pump, at) => setTimeClocks(pump, at),
    shows: (pump, at) =>
      pump.powered &&
      pump.contacts.some(
        ({ clock }) => clock !== undefined && Math.abs(dialErrorMs(pump, clock.dial, at)) > NOTICEABLE_MS,
      ),
    ...shift,
  };
}

/** Whether the first clock is one that a cut stops. */
export function hasStoppableClock({ contacts }: PumpSpec): boolean {
  return contacts.find(({ clock }) => clock !== undefined)?.clock?.type === 'synchronous';
}
