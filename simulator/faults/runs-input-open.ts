import { type Fault, MINUTE_MS } from './fault.ts';
import { inputRpm, isSettled } from './pump-view.ts';

export const runsInputOpen: Fault = {
  slug: 'runs-input-open',
  detector: 'wrong-speed',
  cause: 'runs-input-open',
  story: 'All contacts are open, and the motor runs on at the speed of input 1.',
  hours: [6, 40],
  needs: { stretchMs: 8 * MINUTE_MS },
  also: ['input-disagreement'],
  suits: (spec) =>
    inputRpm(spec, 1) > 0 &&
    spec.settings.program.length > 0 &&
    spec.settings.program.every(({ rpm }) => Math.abs(rpm - inputRpm(spec, 1)) > 200),
  begin: (pump) => {
    pump.conditions.runsOpen = 1;
  },
  end: (pump) => {
    pump.conditions.runsOpen = 0;
  },
  shows: (pump, at) => isSettled(pump, at) && pump.command.source === 'program',
};
