import { dutyGpm } from '#simulator/physics/duty-point.ts';
import { shaftWatts } from '#simulator/physics/wet-end.ts';
import type { PumpSpec } from '#simulator/pump-spec.ts';
import { type Fault, HOUR_MS } from './fault.ts';
import { isSettled, loadOfClean } from './pump-view.ts';

/** The slowest speed of the program at which it shows, rpm; undefined where there is none. */
function slowestRpm({ settings }: PumpSpec): number | undefined {
  return settings.program
    .map(({ rpm }) => rpm)
    .filter((rpm) => rpm >= 1500)
    .sort((left, right) => left - right)[0];
}

export const rubbingImpeller: Fault = {
  slug: 'rubbing-impeller',
  detector: 'high-load',
  cause: 'rubbing',
  story: 'A bearing is worn and the impeller rubs: the slow speed takes a third more watts, a fast one hardly more.',
  hours: [20, 120],
  needs: { stretchMs: 3 * HOUR_MS },
  also: [],
  suits: (spec) => slowestRpm(spec) !== undefined,
  begin: (pump) => {
    const { spec, conditions } = pump;
    const rpm = slowestRpm(spec) ?? 1500;
    const gpm = dutyGpm(spec.wetEnd, spec.system, { valve: 1, dirt: 1, staticFeet: 0 }, rpm);
    conditions.frictionWattsPerRpm = (pump.chance.between(0.3, 0.4) * shaftWatts(spec.wetEnd, gpm, rpm)) / rpm;
  },
  end: (pump) => {
    pump.conditions.frictionWattsPerRpm = 0;
  },
  shows: (pump, at) => isSettled(pump, at) && pump.command.source !== 'prime' && loadOfClean(pump, at) > 1.18,
};
