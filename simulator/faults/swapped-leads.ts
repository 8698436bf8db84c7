import { type Fault, MINUTE_MS } from './fault.ts';
import { inputRpm, isClosed, isSettled } from './pump-view.ts';

export const swappedLeads: Fault = {
  slug: 'swapped-leads',
  detector: 'input-disagreement',
  cause: 'swapped-leads',
  story: 'After work at the pad the leads of inputs 1 and 2 sit on each other’s terminals.',
  hours: [20, 100],
  needs: { stretchMs: 5 * MINUTE_MS },
  also: ['wrong-speed', 'missing-input'],
  suits: (spec) =>
    Math.abs(inputRpm(spec, 1) - inputRpm(spec, 2)) > 100 && inputRpm(spec, 1) > 0 && inputRpm(spec, 2) > 0,
  begin: (pump) => {
    pump.conditions.swapped = [1, 2];
  },
  end: (pump) => {
    pump.conditions.swapped = undefined;
  },
  shows: (pump, at) =>
    isSettled(pump, at) && pump.command.source === 'input' && isClosed(pump, 1) !== isClosed(pump, 2),
};
