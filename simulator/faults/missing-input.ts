import type { Fault } from './fault.ts';
import { findClockInput, getClockContact, isDueByClock } from './pump-view.ts';

export const missingInput: Fault = {
  slug: 'missing-input',
  detector: 'missing-input',
  cause: 'one-input',
  story: 'A gopher cut the wire between clock and motor: the window comes and the input stays open.',
  hours: [60, 150],
  needs: { days: 3 },
  also: ['too-little-water'],
  suits: (spec) => findClockInput(spec) !== undefined,
  begin: (pump) => {
    pump.conditions.cutWires = getClockContact(pump).bit;
  },
  end: (pump) => {
    pump.conditions.cutWires = 0;
  },
  shows: (pump, at) => {
    const contact = getClockContact(pump);
    return isDueByClock(contact, at) && (pump.closed & contact.bit) === 0;
  },
};
