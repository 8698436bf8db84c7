import type { Zone } from './zone.ts';

/**
 * A clock's own idea of wall time, ms: at `setAt` it showed `setAt + offsetMs`, and since then it has gained
 * `driftMsPerDay`.
 */
export type Dial = {
  offsetMs: number;
  setAt: number;
  driftMsPerDay: number;
  /** Whether it follows daylight saving by itself. */
  knowsDaylightSaving: boolean;
  /** How long it goes on without power, ms. */
  carryOverMs: number;
  /** What it shows while it stands, wall ms. */
  standsAtMs: number | undefined;
};

const DAY_MS = 86_400_000;
const MINUTE_MS = 60_000;
const WEEK_MINUTES = 7 * 1440;
/** 1 January 1970 was a Thursday; a week here begins on Monday. */
const EPOCH_MINUTE_OF_WEEK = 3 * 1440;

/** Wall time on the dial, ms. */
export function dialMs(dial: Dial, at: number): number {
  if (dial.standsAtMs !== undefined) return dial.standsAtMs;
  return at + dial.offsetMs + ((at - dial.setAt) / DAY_MS) * dial.driftMsPerDay;
}

/** Minutes since Monday midnight on the dial, 0 to 10080, with a fraction. */
export function minuteOfWeek(wallMs: number): number {
  const minutes = (wallMs / MINUTE_MS + EPOCH_MINUTE_OF_WEEK) % WEEK_MINUTES;
  return minutes < 0 ? minutes + WEEK_MINUTES : minutes;
}

/** Real ms until the dial has gone on by this many minutes: Infinity while it stands. */
export function realMs(dial: Dial, dialMinutes: number): number {
  if (dial.standsAtMs !== undefined) return Number.POSITIVE_INFINITY;
  return (dialMinutes * MINUTE_MS) / (1 + dial.driftMsPerDay / DAY_MS);
}

/** Somebody sets the clock by the wall, wrong by `errorMs`. */
export function setDial(dial: Dial, zone: Zone, at: number, errorMs: number): void {
  dial.offsetMs = zone.offsetAt(at) + errorMs;
  dial.setAt = at;
  if (dial.standsAtMs !== undefined) dial.standsAtMs = at + dial.offsetMs;
}

/** Somebody moves the dial by so many ms. */
export function moveDial(dial: Dial, byMs: number): void {
  if (dial.standsAtMs !== undefined) dial.standsAtMs += byMs;
  dial.offsetMs += byMs;
}

/** Its supply is gone and its carry-over spent: it stands. */
export function stopDial(dial: Dial, at: number): void {
  dial.standsAtMs = dialMs(dial, at);
}

/** Its supply is back: it goes on from where it stood. */
export function startDial(dial: Dial, at: number): void {
  if (dial.standsAtMs === undefined) return;
  dial.offsetMs = dial.standsAtMs - at;
  dial.setAt = at;
  dial.standsAtMs = undefined;
}

/** The zone's offset changed: a clock that knows follows, any other goes on as it was. */
export function passZoneChange(dial: Dial, zone: Zone, at: number): void {
  if (dial.knowsDaylightSaving) moveDial(dial, zone.offsetAt(at) - zone.offsetAt(at - 1000));
}

/** From now on it gains so much a day, ms (below 0: it loses). */
export function letDrift(dial: Dial, at: number, driftMsPerDay: number): void {
  dial.offsetMs = dialMs(dial, at) - at;
  dial.setAt = at;
  dial.driftMsPerDay = driftMsPerDay;
}
