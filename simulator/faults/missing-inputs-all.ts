import type { Fault } from './fault.ts';
import { isDueByClock } from './pump-view.ts';

export const missingInputsAll: Fault = {
  slug: 'missing-inputs-all',
  detector: 'missing-input',
  cause: 'all-inputs',
  story: 'The breaker of the clocks is off: none of their contacts closes any more.',
  hours: [60, 150],
  needs: { days: 3 },
  also: ['too-little-water', 'clock-shift'],
  suits: ({ contacts }) => contacts.filter(({ clock }) => clock !== undefined).length >= 2,
  begin: (pump) => {
    pump.conditions.cutWires = pump.contacts.reduce(
      (mask, { bit, clock }) => (clock === undefined ? mask : mask | bit),
      0,
    );
  },
  end: (pump) => {
    pump.conditions.cutWires = 0;
  },
  shows: (pump, at) => pump.contacts.some((contact) => isDueByClock(contact, at) && (pump.closed & contact.bit) === 0),
};
