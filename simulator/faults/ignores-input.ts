import { type Fault, MINUTE_MS } from './fault.ts';
import { findClockInput, getClockContact, inputRpm } from './pump-view.ts';

export const ignoresInput: Fault = {
  slug: 'ignores-input',
  detector: 'wrong-speed',
  cause: 'ignores-input',
  story: 'A wire has worked loose at the motor: the contact closes, the motor does not notice.',
  hours: [20, 100],
  needs: { stretchMs: 8 * MINUTE_MS },
  also: ['input-disagreement'],
  suits: (spec) => {
    const input = findClockInput(spec);
    return (
      input !== undefined &&
      spec.settings.program.every(({ rpm }) => Math.abs(rpm - inputRpm(spec, input.number)) > 200)
    );
  },
  begin: (pump) => {
    pump.conditions.ignores = getClockContact(pump).bit;
  },
  end: (pump) => {
    pump.conditions.ignores = 0;
  },
  shows: (pump) =>
    (pump.closed & pump.conditions.ignores) !== 0 &&
    pump.command.activeInput === 0 &&
    pump.command.source === 'program',
};
