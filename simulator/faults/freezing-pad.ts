import { padCelsius } from '#simulator/decide.ts';
import { press } from '#simulator/pad-deeds.ts';
import type { Pump } from '#simulator/pump.ts';
import { type Fault, HOUR_MS } from './fault.ts';

/** How cold the coldest hour gets, °C. */
const COLDEST_CELSIUS = -4;

export const freezingPad: Fault = {
  slug: 'freezing-pad',
  detector: 'freezing',
  cause: null,
  story: 'A hard frost, and somebody has pressed stop: water stands in the pipes.',
  hours: [20, 34],
  needs: { stretchMs: HOUR_MS },
  also: ['stopped', 'energized-without-flow', 'too-little-water', 'unexpected-run'],
  suits: ({ model }) => model.says.temperatures && model.stopBeatsInputs,
  begin: (pump, at, until) => {
    const byCelsius = COLDEST_CELSIUS - findColdest(pump, at + 6 * HOUR_MS, until - 6 * HOUR_MS);
    pump.conditions.spells.push({ from: at, until, byCelsius: Math.min(0, byCelsius) });
    press(pump, { key: 'stop' }, at);
  },
  end: (pump, at) => press(pump, { key: 'resume' }, at),
  // From the guard's limit on where there is a guard, else from the freezing point.
  shows: (pump, at) => pump.shaft.targetRpm === 0 && padCelsius(pump, at) <= (pump.spec.settings.freeze?.celsius ?? 0),
};

function findColdest(pump: Pump, from: number, until: number): number {
  let coldest = Number.POSITIVE_INFINITY;
  for (let at = from; at <= until; at += HOUR_MS) coldest = Math.min(coldest, padCelsius(pump, at));
  return Number.isFinite(coldest) ? coldest : 0;
}
