import { type Fault, MINUTE_MS } from './fault.ts';
import { findClockInput, getClockContact, isDueByClock } from './pump-view.ts';

export const looseWire: Fault = {
  slug: 'loose-wire',
  detector: 'chattering-input',
  cause: 'loose-wire',
  story: 'A clamp has worked loose: while the clock holds the contact closed, the motor sees it come and go.',
  hours: [20, 90],
  needs: { stretchMs: 40 * MINUTE_MS },
  also: ['wrong-speed', 'input-disagreement', 'missing-input', 'clock-shift'],
  suits: (spec) => findClockInput(spec) !== undefined,
  begin: (pump, at) => {
    const { bit } = getClockContact(pump);
    pump.conditions.chatter = { bit, meanRestMs: 12 * MINUTE_MS, burstLeft: 0, nextAt: at };
  },
  end: (pump) => {
    pump.conditions.chatter = undefined;
  },
  shows: (pump, at) => isDueByClock(getClockContact(pump), at),
};
