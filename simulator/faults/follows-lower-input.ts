import { type Fault, MINUTE_MS } from './fault.ts';
import { inputRpm, isClosed, isSettled } from './pump-view.ts';

export const followsLowerInput: Fault = {
  slug: 'follows-lower-input',
  detector: 'wrong-speed',
  cause: 'follows-lower-input',
  story: 'Two inputs are closed and the motor runs the lower of their speeds.',
  hours: [30, 100],
  needs: { stretchMs: 8 * MINUTE_MS },
  also: ['input-disagreement'],
  // Two clocks whose windows overlap.
  suits: (spec) => {
    const [first, second] = spec.contacts;
    const a = first?.clock?.trippers[0];
    const b = second?.clock?.trippers[0];
    if (first === undefined || second === undefined || a === undefined || b === undefined) return false;
    const overlap = Math.min(a.offMinute, b.offMinute) - Math.max(a.onMinute, b.onMinute);
    return overlap > 40 && Math.abs(inputRpm(spec, first.number) - inputRpm(spec, second.number)) > 100;
  },
  begin: (pump) => {
    pump.conditions.followsLower = true;
  },
  end: (pump) => {
    pump.conditions.followsLower = false;
  },
  shows: (pump, at) => isSettled(pump, at) && pump.command.source === 'input' && isClosed(pump, 1) && isClosed(pump, 2),
};
