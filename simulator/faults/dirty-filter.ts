import { addDeed, type Pump } from '#simulator/pump.ts';
import { type Fault, HOUR_MS } from './fault.ts';
import { cleanGpm, isSettled } from './pump-view.ts';

/** Friction of the filter has grown to this by the end, times the clean one. */
const FULL_FACTOR = 9;

export const dirtyFilter: Fault = {
  slug: 'dirty-filter',
  detector: 'low-load',
  cause: 'slow',
  story: 'Nobody cleans the filter: the flow goes down day by day at the same speed.',
  hours: [9 * 24, 16 * 24],
  needs: { days: 5 },
  also: ['too-little-water', 'energized-without-flow'],
  suits: ({ purpose, settings }) => purpose === 'filter' && settings.program.some((entry) => entry.rpm >= 1600),
  begin: (pump, at, until) => {
    const steps = Math.max(1, Math.floor((until - at) / (6 * HOUR_MS)));
    for (let step = 1; step <= steps; step += 1) {
      // Two thirds of the time to the full factor, then it stays there.
      const share = Math.min(1, (step / steps) * 1.5);
      addDeed(pump, at + step * 6 * HOUR_MS, (dirty: Pump) => {
        if (dirty.conditions.valve > 0.9) dirty.conditions.valve = FULL_FACTOR ** share;
      });
    }
  },
  end: (pump) => {
    pump.conditions.valve = 1;
    pump.dirt.filter = 1;
  },
  shows: (pump, at) => isSettled(pump, at) && pump.load.gpm < 0.66 * cleanGpm(pump, pump.shaft.targetRpm),
};
