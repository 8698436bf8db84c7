import { getFault } from '#simulator/faults/catalogue.ts';
import type { Fleet } from '#simulator/fleet.ts';
import { press } from '#simulator/pad-deeds.ts';
import { addDeed, type Pump } from '#simulator/pump.ts';
import { scheduleFault } from '#simulator/schedule-fault.ts';
import type { TruthBook } from '#simulator/truth.ts';

/** Which pump: a pad by its name, and the pump's place on it; 0, the filter pump, unless said otherwise. */
type Place = { readonly pad: string; readonly pump?: number };

/** A fault in the month before the demo: it began so many days before the month's end, at a local time of day. */
export type HistoryLine = Place & {
  readonly daysBefore: number;
  readonly at: string;
  readonly fault: string;
  readonly hours: number;
  /** Comes again after so many days, for ever. */
  readonly everyDays?: number;
};

/** Something in the live demo, so many minutes after the start, and again after every round. */
export type LiveLine = Place & {
  readonly afterMinutes: number;
  readonly forMinutes: number;
} & ({ readonly fault: string } | { readonly leverOfInput: number } | { readonly timedRun: true });

const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;
const DAY_MS = 24 * HOUR_MS;

/** Puts the month's faults on the pumps of a fleet. `end` is the end of the month, ms. Pumps that are left out are skipped. */
export function playHistory(fleet: Fleet, lines: readonly HistoryLine[], end: number, truth?: TruthBook): void {
  for (const line of lines) {
    const pump = findPump(fleet, line);
    if (pump === undefined) continue;
    const from = startOf(pump, line, end);
    recur(pump, line, from, truth);
  }
}

function recur(pump: Pump, line: HistoryLine, from: number, truth: TruthBook | undefined): void {
  const { everyDays } = line;
  if (from >= pump.now) scheduleFault(pump, getFault(line.fault), from, from + line.hours * HOUR_MS, truth);
  if (everyDays === undefined) return;
  // Planned one at a time: the next when this one is under way.
  addDeed(pump, Math.max(pump.now, from + 1), () => recur(pump, line, from + everyDays * DAY_MS, truth));
}

/** The instant of a line: its local day and time at the pad. */
export function startOf(pump: Pump, line: Pick<HistoryLine, 'daysBefore' | 'at'>, end: number): number {
  const [hours = 0, minutes = 0] = line.at.split(':').map(Number);
  const day = Math.floor((end + pump.zone.offsetAt(end)) / DAY_MS) - line.daysBefore;
  const wall = day * DAY_MS + hours * HOUR_MS + minutes * MINUTE_MS;
  return wall - pump.zone.offsetAt(wall - pump.zone.offsetAt(wall));
}

/** Plays the live lines from `start` on, round after round. */
export function playLive(fleet: Fleet, lines: readonly LiveLine[], roundMinutes: number, start: number): void {
  for (const line of lines) {
    const pump = findPump(fleet, line);
    if (pump !== undefined) playRound(pump, line, roundMinutes, start);
  }
}

function playRound(pump: Pump, line: LiveLine, roundMinutes: number, start: number): void {
  const from = start + line.afterMinutes * MINUTE_MS;
  const until = from + line.forMinutes * MINUTE_MS;
  if ('fault' in line) scheduleFault(pump, getFault(line.fault), from, until);
  else if ('timedRun' in line) addDeed(pump, from, (_, at) => press(pump, { key: 'timed' }, at));
  else holdLever(pump, line.leverOfInput, from, until);
  addDeed(pump, until + MINUTE_MS, () => playRound(pump, line, roundMinutes, start + roundMinutes * MINUTE_MS));
}

function holdLever(pump: Pump, input: number, from: number, until: number): void {
  const bit = 1 << (input - 1);
  addDeed(pump, from, ({ conditions }) => {
    conditions.heldClosed |= bit;
  });
  addDeed(pump, until, ({ conditions }) => {
    conditions.heldClosed &= ~bit;
  });
}

/** The pump a line speaks of, or undefined when the fleet does not have it. */
export function findPump(fleet: Fleet, place: Place): Pump | undefined {
  return fleet.pumps.filter(({ spec }) => spec.padName === place.pad)[place.pump ?? 0];
}
