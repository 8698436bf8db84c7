import { type Fault, HOUR_MS } from './fault.ts';
import { findClockInput, getClockContact, isDueByClock } from './pump-view.ts';

export const switchFailing: Fault = {
  slug: 'switch-failing',
  detector: 'chattering-input',
  cause: 'switch-failing',
  story: 'The clock’s switch is worn out: on most days it flutters once or twice while it should hold.',
  hours: [96, 200],
  needs: { days: 4 },
  also: ['wrong-speed', 'input-disagreement', 'missing-input', 'clock-shift'],
  suits: (spec) => findClockInput(spec)?.clock?.type === 'synchronous',
  begin: (pump, at) => {
    const { bit } = getClockContact(pump);
    pump.conditions.chatter = { bit, meanRestMs: 2.5 * HOUR_MS, burstLeft: 0, nextAt: at };
  },
  end: (pump) => {
    pump.conditions.chatter = undefined;
  },
  shows: (pump, at) => isDueByClock(getClockContact(pump), at),
};
