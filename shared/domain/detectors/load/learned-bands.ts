import { isRecord, type Json } from '../plain-state.ts';
import { mergeSketch, type Spread, sketchSpread, type WattsSketch, weightedMedian } from './watts-sketch.ts';

/** What one speed usually draws. `valid` after 30 minutes over two starts. */
export type Band = { readonly rpm: number; readonly median: number; readonly mad: number; readonly valid: boolean };

type DaySpread = [day: number, seconds: number, median: number, mad: number];
/** One speed's history: finished days as spreads, the day in hand as a sketch. */
type SpeedHistory = {
  rpm: number;
  starts: number;
  lastStart: number;
  day: number;
  sketch: WattsSketch;
  days: DaySpread[];
};

const KEPT_DAYS = 14;
const KEPT_SPEEDS = 10;
const VALID_SECONDS = 1800;
const VALID_STARTS = 2;
/** Readings within this share of a speed belong to it. */
export const SAME_SPEED_SHARE = 0.02;

/** The learnt watts of one pump by speed, over the last fourteen days on which each speed ran. */
export type LearnedBands = {
  /** The band of a speed, rpm; undefined where that speed has none yet. */
  readonly find: (rpm: number) => Band | undefined;
  readonly list: () => readonly Band[];
  /** Adds a stretch at one speed: `day` counts days since 1970 UTC, `start` names the start it belongs to. */
  readonly add: (rpm: number, sketch: WattsSketch, day: number, start: number) => void;
  readonly save: () => Json;
};

/**
 * Bands as they were saved, or none. A saved value that cannot be read is forgotten.
 *
 * @example createLearnedBands(undefined).find(2850) // undefined
 */
export function createLearnedBands(saved: unknown): LearnedBands {
  const speeds = Array.isArray(saved) ? saved.flatMap(parseHistory) : [];
  const bands = speeds.map(bandOf);
  const indexOf = (rpm: number): number =>
    speeds.findIndex((speed) => Math.abs(speed.rpm - rpm) <= speed.rpm * SAME_SPEED_SHARE);
  return {
    find: (rpm) => bands[indexOf(rpm)],
    list: () => bands,
    add: (rpm, sketch, day, start) => {
      let index = indexOf(rpm);
      if (index === -1) index = makeRoom(speeds, bands, rpm, day);
      const speed = speeds[index];
      if (speed === undefined) return;
      // A pump that never stands has no starts: there another day counts as one.
      if (speed.lastStart !== start || speed.day !== day) speed.starts = Math.min(speed.starts + 1, 1000);
      if (speed.day !== day) closeDay(speed, day);
      speed.lastStart = start;
      mergeSketch(speed.sketch, sketch);
      bands[index] = bandOf(speed);
    },
    save: () =>
      speeds.map((speed) => ({ ...speed, sketch: { ...speed.sketch }, days: speed.days.map((day) => [...day]) })),
  };
}

function makeRoom(speeds: SpeedHistory[], bands: Band[], rpm: number, day: number): number {
  if (speeds.length >= KEPT_SPEEDS) {
    const oldest = speeds.reduce((least, speed, index) => (speed.day < (speeds[least]?.day ?? 0) ? index : least), 0);
    speeds.splice(oldest, 1);
    bands.splice(oldest, 1);
  }
  const speed: SpeedHistory = { rpm: Math.round(rpm), starts: 0, lastStart: -1, day, sketch: {}, days: [] };
  speeds.push(speed);
  bands.push(bandOf(speed));
  return speeds.length - 1;
}

function closeDay(speed: SpeedHistory, day: number): void {
  const spread = sketchSpread(speed.sketch);
  if (spread !== undefined)
    speed.days.push([speed.day, Math.round(spread.seconds), round(spread.median), round(spread.mad)]);
  while (speed.days.length > KEPT_DAYS || (speed.days[0]?.[0] ?? day) < day - 4 * KEPT_DAYS) speed.days.shift();
  speed.day = day;
  speed.sketch = {};
}

function bandOf(speed: SpeedHistory): Band {
  const today = sketchSpread(speed.sketch);
  const spreads: Spread[] = speed.days.map(([, seconds, median, mad]) => ({ seconds, median, mad }));
  if (today !== undefined) spreads.push(today);
  const seconds = spreads.reduce((sum, spread) => sum + spread.seconds, 0);
  const median = weightedMedian(spreads.map((spread) => ({ value: spread.median, weight: spread.seconds }))) ?? 0;
  const mad =
    weightedMedian(
      spreads.map((spread) => ({ value: spread.mad + Math.abs(spread.median - median), weight: spread.seconds })),
    ) ?? 0;
  return { rpm: speed.rpm, median, mad, valid: seconds >= VALID_SECONDS && speed.starts >= VALID_STARTS };
}

const round = (value: number): number => Math.round(value * 10) / 10;

function parseHistory(value: unknown): SpeedHistory[] {
  if (!isRecord(value) || !isRecord(value.sketch) || !Array.isArray(value.days)) return [];
  const { rpm, starts, lastStart, day } = value;
  if (!isNumber(rpm) || !isNumber(starts) || !isNumber(lastStart) || !isNumber(day)) return [];
  const sketch: WattsSketch = {};
  for (const [bin, seconds] of Object.entries(value.sketch)) {
    if (isNumber(seconds) && Number.isInteger(Number(bin))) sketch[Number(bin)] = seconds;
  }
  return [{ rpm, starts, lastStart, day, sketch, days: value.days.filter(isDaySpread) }];
}

function isDaySpread(value: unknown): value is DaySpread {
  return Array.isArray(value) && value.length === 4 && value.every(isNumber);
}

function isNumber(value: unknown): value is number {
  return typeof value === 'number' && Number.isFinite(value);
}
