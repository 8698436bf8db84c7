import { instantOf } from '../time/instant-of.ts';
import { DAY_MINUTES, HOUR_MS, localTime, MINUTE_MS, weekdayOf } from '../time/local-time.ts';
import type { MotorSettings, MotorTraits } from './motor-settings.ts';

/** A stretch (ms, half-open) under one program entry; `entry` counts from 0, -1 = none due, then `rpm` is 0. */
export type ProgramSlot = { readonly from: number; readonly to: number; readonly entry: number; readonly rpm: number };

/** The program laid out in instants, without a gap from `from` to `to`; best laid out anew from `freshUntil`. */
export type ProgramTimeline = {
  readonly from: number;
  readonly to: number;
  readonly freshUntil: number;
  readonly slots: readonly ProgramSlot[];
};

type Occurrence = { readonly from: number; readonly to: number; readonly entry: number; readonly rpm: number };

const DAYS_BEFORE = 2;
const DAYS_AHEAD = 9;

/**
 * Lays a program out in instants, from a day before the motor's day that holds `at` to eight days after it.
 *
 * The motor's clock shows the pad's wall time plus `motorClockOffsetMinutes`, and so jumps when the wall does; an
 * entry lasts from the first instant at which that clock reaches its beginning to the first at which it reaches its
 * end. A skipped time is therefore the instant of the shift, a doubled one its first occurrence, and an entry wholly
 * inside a skipped hour does not run. An unknown zone is read as UTC.
 *
 * @example programTimeline(settings, 'first-listed', 'America/Phoenix', 0, at).slots
 */
export function programTimeline(
  program: MotorSettings['program'],
  overlap: MotorTraits['programOverlap'],
  zone: string,
  motorClockOffsetMinutes: number,
  at: number,
): ProgramTimeline {
  const offset = Number.isFinite(motorClockOffsetMinutes) ? motorClockOffsetMinutes : 0;
  const today = localTime(zone, at + offset * MINUTE_MS)?.epochDay ?? Math.floor(at / (DAY_MINUTES * MINUTE_MS));
  const instant = (day: number, minute: number): number =>
    instantOf(zone, day, minute - offset) ?? (day * DAY_MINUTES + minute - offset) * MINUTE_MS;
  const occurrences: Occurrence[] = [];
  for (let day = today - DAYS_BEFORE; day < today + DAYS_AHEAD; day += 1) {
    program.forEach(({ days, fromMinute, toMinute, rpm }, entry) => {
      if (days[weekdayOf(day)] !== true || fromMinute === toMinute) return;
      const from = instant(day, fromMinute);
      const to = instant(toMinute > fromMinute ? day : day + 1, toMinute);
      if (from < to) occurrences.push({ from, to, entry, rpm });
    });
  }
  const from = instant(today - DAYS_BEFORE + 1, 0);
  const to = instant(today + DAYS_AHEAD - 1, 0);
  const freshUntil = Math.max(instant(today + 1, 0), at + HOUR_MS);
  return { from, to, freshUntil, slots: layOut(occurrences, overlap, from, to) };
}

function layOut(
  occurrences: readonly Occurrence[],
  overlap: MotorTraits['programOverlap'],
  from: number,
  to: number,
): ProgramSlot[] {
  const edges = new Set<number>([from, to]);
  for (const occurrence of occurrences) {
    if (occurrence.from > from && occurrence.from < to) edges.add(occurrence.from);
    if (occurrence.to > from && occurrence.to < to) edges.add(occurrence.to);
  }
  const instants = [...edges].sort((left, right) => left - right);
  const slots: { from: number; to: number; entry: number; rpm: number }[] = [];
  for (let index = 0; index + 1 < instants.length; index += 1) {
    const slotFrom = instants[index] ?? from;
    const slotTo = instants[index + 1] ?? to;
    const winner = winnerAt(occurrences, overlap, slotFrom);
    const last = slots.at(-1);
    const entry = winner?.entry ?? -1;
    if (last !== undefined && last.entry === entry) last.to = slotTo;
    else slots.push({ from: slotFrom, to: slotTo, entry, rpm: winner?.rpm ?? 0 });
  }
  return slots;
}

function winnerAt(
  occurrences: readonly Occurrence[],
  overlap: MotorTraits['programOverlap'],
  at: number,
): Occurrence | undefined {
  let winner: Occurrence | undefined;
  for (const candidate of occurrences) {
    if (at < candidate.from || at >= candidate.to) continue;
    if (winner === undefined || beats(candidate, winner, overlap)) winner = candidate;
  }
  return winner;
}

function beats(candidate: Occurrence, winner: Occurrence, overlap: MotorTraits['programOverlap']): boolean {
  if (overlap === 'higher-speed' && candidate.rpm !== winner.rpm) return candidate.rpm > winner.rpm;
  return candidate.entry < winner.entry;
}

/**
 * The position in a timeline's slots of the one that holds an instant; -1 outside the timeline.
 *
 * @example timeline.slots[findSlotIndex(timeline, at)]
 */
export function findSlotIndex(timeline: ProgramTimeline, at: number): number {
  if (!(at >= timeline.from && at < timeline.to)) return -1;
  let low = 0;
  let high = timeline.slots.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if ((timeline.slots[middle]?.from ?? Number.POSITIVE_INFINITY) <= at) low = middle;
    else high = middle - 1;
  }
  return low;
}
