import { type Fault, HOUR_MS } from './fault.ts';
import { findClockInput, getClockContact, isDueByClock } from './pump-view.ts';

export const leverLeftOn: Fault = {
  slug: 'lever-left-on',
  detector: 'stuck-input',
  cause: 'lever-left-on',
  story: 'Somebody turned the clock’s lever on for the afternoon and forgot it.',
  hours: [5, 20],
  needs: { stretchMs: 4 * HOUR_MS },
  also: [],
  suits: (spec) => findClockInput(spec)?.clock !== undefined && findClockInput(spec)?.clock?.type !== 'electronic',
  begin: (pump) => {
    pump.conditions.heldClosed |= getClockContact(pump).bit;
  },
  end: (pump) => {
    pump.conditions.heldClosed &= ~getClockContact(pump).bit;
  },
  shows: (pump, at) => (pump.closed & getClockContact(pump).bit) !== 0 && !isDueByClock(getClockContact(pump), at),
};
