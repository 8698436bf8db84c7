import { type Fault, HOUR_MS } from './fault.ts';
import { findClockInput, getClockContact, isDueByClock } from './pump-view.ts';

export const switchWelded: Fault = {
  slug: 'switch-welded',
  detector: 'stuck-input',
  cause: 'switch-welded',
  story: 'The contacts of the switch have welded together.',
  hours: [40, 120],
  needs: { stretchMs: 4 * HOUR_MS },
  also: [],
  suits: (spec) => findClockInput(spec) !== undefined,
  begin: (pump) => {
    pump.conditions.stuckClosed = getClockContact(pump).bit;
  },
  end: (pump) => {
    pump.conditions.stuckClosed = 0;
  },
  shows: (pump, at) => (pump.closed & pump.conditions.stuckClosed) !== 0 && !isDueByClock(getClockContact(pump), at),
};
