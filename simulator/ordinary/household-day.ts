import { cleanBasket, press } from '#simulator/pad-deeds.ts';
import { cutPower } from '#simulator/power.ts';
import { addDeed, type Pump } from '#simulator/pump.ts';
import type { Random } from '#simulator/random.ts';
import { addOrdinaryDeed } from './ordinary-deed.ts';

const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;

type Habit = {
  /** How likely on one day. */
  readonly likely: number;
  /** Hours of the day between which it begins. */
  readonly between: readonly [number, number];
  readonly minutes: readonly [number, number];
  readonly act: (pump: Pump, at: number, forMs: number) => void;
};

/** What happens at a pad where people live: none of it is a fault. */
const HABITS: readonly Habit[] = [
  // Somebody cleans the basket.
  { likely: 0.05, between: [9, 18], minutes: [3, 8], act: (pump, at, forMs) => cleanBasket(pump, at, forMs, 'keypad') },
  // Vacuuming by hand at a higher speed.
  { likely: 0.04, between: [9, 17], minutes: [25, 70], act: holdManual },
  // The timed high-speed run.
  { likely: 0.05, between: [10, 20], minutes: [1, 1], act: startTimed },
  // A party: the clock's lever stays on for another two hours.
  { likely: 0.015, between: [16, 19], minutes: [60, 150], act: holdLever },
  // The router restarts; the line is down for a while.
  { likely: 0.03, between: [0, 23], minutes: [1, 6], act: dropLink },
  { likely: 0.012, between: [0, 23], minutes: [10, 40], act: dropLink },
  // The lights flicker.
  {
    likely: 0.006,
    between: [0, 23],
    minutes: [0.05, 0.3],
    act: (pump, at, forMs) => cutPower(pump, at, at + forMs, 'street'),
  },
];

export function planHouseholdDay(pump: Pump, random: Random, dayStart: number): void {
  for (const habit of HABITS) {
    // Every chance is drawn, taken or not, so that one habit's luck does not move the next one's.
    const happens = random.chance(habit.likely);
    const at = Math.round(dayStart + random.between(...habit.between) * HOUR_MS);
    const forMs = Math.round(random.between(...habit.minutes) * MINUTE_MS);
    if (happens) addOrdinaryDeed(pump, at, forMs / MINUTE_MS, (_, when) => habit.act(pump, when, forMs));
  }
}

function holdManual(pump: Pump, at: number, forMs: number): void {
  press(pump, { key: 'manual', rpm: Math.min(3000, pump.settings.maxRpm) }, at);
  addDeed(pump, at + forMs, (_, when) => press(pump, { key: 'resume' }, when));
}

function startTimed(pump: Pump, at: number): void {
  const { timed } = pump.settings;
  if (timed === null) return;
  pump.busyUntil = at + timed.minutes * MINUTE_MS;
  press(pump, { key: 'timed' }, at);
}

function holdLever(pump: Pump, at: number, forMs: number): void {
  const contact = pump.contacts.find(({ clock }) => clock !== undefined && clock.type !== 'electronic');
  if (contact === undefined) return;
  pump.conditions.heldClosed |= contact.bit;
  addDeed(pump, at + forMs, () => {
    pump.conditions.heldClosed &= ~contact.bit;
  });
}

function dropLink(pump: Pump, at: number, forMs: number): void {
  pump.linkUp = false;
  addDeed(pump, at + forMs, () => {
    pump.linkUp = true;
  });
}
