import { openLid, setTimeClocks, workOnPump } from '#simulator/pad-deeds.ts';
import { addDeed, type Pump } from '#simulator/pump.ts';
import type { Random } from '#simulator/random.ts';
import { addOrdinaryDeed } from './ordinary-deed.ts';

const MINUTE_MS = 60_000;

/**
 * The technician's regular stop: breakers off, basket cleaned, every fourth time the filter as well, clocks set.
 * He says on his phone that he is on site, and that he has left.
 */
export function planWeeklyStop(pump: Pump, random: Random, dayStart: number): void {
  const at = dayStart + random.between(8.5, 15) * 60 * MINUTE_MS;
  const offMinutes = random.between(5, 11);
  const cleansFilter = random.chance(0.25);
  const stopBy = random.chance(0.5) ? 'breaker' : 'keypad';
  addOrdinaryDeed(pump, Math.round(at), 45, (_, arrived) => {
    pump.onSite = true;
    const offAt = arrived + 4 * MINUTE_MS;
    const onAt = offAt + Math.round(offMinutes * MINUTE_MS);
    addDeed(pump, offAt, (_pump, when) =>
      workOnPump(pump, when, onAt - offAt, stopBy, (doneAt) => {
        openLid(pump, doneAt);
        if (cleansFilter) pump.dirt.filter = 1;
      }),
    );
    addDeed(pump, onAt + 20 * MINUTE_MS, (_pump, when) => {
      setTimeClocks(pump, when);
      pump.onSite = false;
    });
  });
}
