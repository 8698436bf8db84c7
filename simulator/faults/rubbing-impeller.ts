import { type Fault, HOUR_MS } from './fault.ts';
import { isSettled } from './pump-view.ts';

export const rubbingImpeller: Fault = {
  slug: 'rubbing-impeller',
  detector: 'high-load',
  cause: 'rubbing',
  story: 'A bearing is worn and the impeller rubs: the same speed takes a fifth more watts.',
  hours: [20, 120],
  needs: { stretchMs: 3 * HOUR_MS },
  also: [],
  suits: ({ settings }) => settings.program.some((entry) => entry.rpm >= 1500),
  begin: (pump) => {
    pump.conditions.rubbing = pump.chance.between(0.24, 0.3);
  },
  end: (pump) => {
    pump.conditions.rubbing = 0;
  },
  shows: (pump, at) => isSettled(pump, at) && pump.command.source !== 'prime' && pump.shaft.targetRpm >= 1500,
};
