import { setTimeClocks } from '#simulator/pad-deeds.ts';
import { cutPower } from '#simulator/power.ts';
import { addDeed, type Pump } from '#simulator/pump.ts';
import { DAY_MS, type Fault, HOUR_MS } from './fault.ts';

export const fedThroughClock: Fault = {
  slug: 'fed-through-clock',
  detector: 'fed-through-clock',
  cause: null,
  story: 'The motor was wired behind the old time clock’s line contacts: every night it loses its power.',
  hours: [70, 160],
  needs: { days: 3 },
  also: [
    'clock-shift',
    'silent',
    'stopped',
    'missing-input',
    'stuck-input',
    'too-little-water',
    'failed-prime',
    'motor-clock',
    'freezing',
  ],
  suits: ({ purpose }) => purpose === 'filter',
  begin: (pump, at, until) => {
    const offset = pump.zone.offsetAt(at);
    const firstDay = Math.floor((at + offset) / DAY_MS);
    for (let day = firstDay; day * DAY_MS - offset < until; day += 1) {
      const off = day * DAY_MS - offset + 22.25 * HOUR_MS;
      // The dial itself is exact to a minute or so.
      const wobble = pump.chance.between(-60_000, 60_000);
      if (off < at || off + 8 * HOUR_MS > until) continue;
      addDeed(pump, off + wobble, (fed: Pump, when) => cutPower(fed, when, when + 7.5 * HOUR_MS, 'motor'));
    }
  },
  // Whoever wires it right sets the clocks that stood with it.
  end: (pump, at) => setTimeClocks(pump, at),
  shows: (pump) => !pump.powered,
};
