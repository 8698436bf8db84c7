import { type Fault, HOUR_MS } from './fault.ts';
import { findClockInput, getClockContact, isDueByClock } from './pump-view.ts';

export const tripperMissing: Fault = {
  slug: 'tripper-missing',
  detector: 'stuck-input',
  cause: 'tripper-missing',
  story: 'The off tripper fell from the dial: once closed, the switch stays closed.',
  hours: [40, 90],
  needs: { stretchMs: 4 * HOUR_MS },
  also: ['too-little-water'],
  suits: (spec) => findClockInput(spec)?.clock?.type === 'synchronous',
  begin: (pump) => {
    pump.conditions.latchesClosed = getClockContact(pump).bit;
  },
  end: (pump) => {
    pump.conditions.latchesClosed = 0;
  },
  shows: (pump, at) => {
    const contact = getClockContact(pump);
    return (pump.closed & contact.bit) !== 0 && !isDueByClock(contact, at);
  },
};
