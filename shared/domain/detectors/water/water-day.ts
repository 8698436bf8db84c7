import { DAY_MS, MINUTE_MS } from '#shared/domain/time/local-time.ts';
import { CAUSE_CHAIN, CONSEQUENCES } from '../cause-chain.data.ts';
import type { Detector } from '../detector.ts';
import type { Facts } from '../facts.ts';
import type { PlainState } from '../plain-state.ts';

/**
 * The local day in hand: how much of it was seen, how long the shaft turned, and of that without a known flow (ms);
 * gallons moved, and what a clean system would have moved; and for each piece of equipment with a minimum flow how
 * long it was due, and of that had too little or enough. `explained` = an alarm stood that explains little water.
 */
export type WaterDay = PlainState & {
  day: number;
  offsetMinutes: number;
  seenMs: number;
  turningMs: number;
  unknownMs: number;
  gallons: number;
  cleanGallons: number;
  shortMs: number[];
  enoughMs: number[];
  explained: boolean;
};

export const restingDay = (): WaterDay => ({
  day: 0,
  offsetMinutes: 0,
  seenMs: 0,
  turningMs: 0,
  unknownMs: 0,
  gallons: 0,
  cleanGallons: 0,
  shortMs: [],
  enoughMs: [],
  explained: false,
});

/** What explains too little water while it stands. */
const EXPLAINERS: readonly Detector[] = CAUSE_CHAIN.filter((one) => CONSEQUENCES[one]?.includes('too-little-water'));
/** A minimum counts as missed below it by half a sigma of the flow. */
const SIGMAS_SHORT = 0.5;
/** Alarms are looked at once in so long, ms. */
const LOOK_MS = 300_000;

/** Adds a reading's interval to the day. */
export function addToDay(day: WaterDay, facts: Facts): void {
  const { elapsedMs, gap, control, water } = facts;
  if (gap || elapsedMs <= 0) return;
  const before = Math.floor(day.seenMs / LOOK_MS);
  day.seenMs += elapsedMs;
  if (Math.floor(day.seenMs / LOOK_MS) !== before) day.explained ||= EXPLAINERS.some(facts.stands);
  if (control.standing) return;
  day.turningMs += elapsedMs;
  if (!(water.gpm >= 0)) {
    day.unknownMs += elapsedMs;
    return;
  }
  const minutes = elapsedMs / MINUTE_MS;
  day.gallons += water.gpm * minutes;
  day.cleanGallons += water.cleanGpm * minutes;
  if (control.rampOver) addEquipment(day, facts);
}

function addEquipment(day: WaterDay, { elapsedMs, water, control, reading, context }: Facts): void {
  const { equipment } = context;
  if (equipment.length === 0 || control.due.source === 'prime') return;
  for (let index = 0; index < equipment.length; index += 1) {
    const { minimumGpm = 0, input, kind } = equipment[index] ?? { kind: 'feature' as const };
    if (!(minimumGpm > 0) || (kind !== 'heater' && kind !== 'cell')) continue;
    // Nobody knows when a heater without an input of its own is called for.
    const due = input === undefined ? kind === 'cell' : (reading.closedInputs & (1 << (input - 1))) !== 0;
    if (!due) continue;
    const short = water.gpm * (1 + SIGMAS_SHORT * water.sigmaShare) < minimumGpm;
    const list = short ? day.shortMs : day.enoughMs;
    while (list.length <= index) list.push(0);
    list[index] = (list[index] ?? 0) + elapsedMs;
  }
}

/** How much of the day, of its 23, 24 or 25 hours, was seen. */
export const coverageOf = (day: WaterDay, offsetMinutesNow: number): number =>
  day.seenMs / (DAY_MS - (offsetMinutesNow - day.offsetMinutes) * MINUTE_MS);
