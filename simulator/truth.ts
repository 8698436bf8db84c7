import type { Fault } from './faults/fault.ts';
import type { Pump } from './pump.ts';

/**
 * What was truly wrong, for scoring. `from` and `to` are the first and last instants at which the readings showed it
 * (null: it still stands), or where they never did, those of the fault itself. `required` = it showed for as long as a rule needs; otherwise a rule may speak or not.
 * `also` lists detectors that may speak about it beside the one named.
 */
export type TruthRow = {
  readonly s: string;
  readonly fault: string;
  readonly detector: string;
  /** Null where the table of detectors names no causes. */
  readonly cause: string | null;
  readonly from: number;
  readonly to: number | null;
  readonly required: boolean;
  readonly also: readonly string[];
  /** When it began and was put right, seen or not. */
  readonly begunAt: number;
  readonly endedAt: number | null;
};

type Sighting = {
  readonly pump: Pump;
  readonly fault: Fault;
  readonly begunAt: number;
  endedAt: number | null;
  firstAt: number | undefined;
  lastAt: number;
  stretchFrom: number;
  longestMs: number;
  stretches: number;
  readonly days: Set<number>;
};

export type TruthBook = {
  readonly open: (pump: Pump, fault: Fault, at: number) => { readonly close: (at: number) => void };
  /** What has been seen so far, in order of first sight. */
  readonly rows: () => TruthRow[];
};

/** Two sightings further apart than this are two stretches, ms. */
const SAME_STRETCH_MS = 150_000;
const DAY_MS = 86_400_000;

export function createTruthBook(): TruthBook {
  const sightings: Sighting[] = [];
  return {
    open: (pump, fault, begunAt) => {
      const sighting: Sighting = {
        pump,
        fault,
        begunAt,
        endedAt: null,
        firstAt: undefined,
        lastAt: Number.NEGATIVE_INFINITY,
        stretchFrom: begunAt,
        longestMs: 0,
        stretches: 0,
        days: new Set(),
      };
      sightings.push(sighting);
      const watch = (at: number) => look(sighting, at);
      pump.watchers.add(watch);
      return {
        close: (at) => {
          sighting.endedAt = at;
          pump.watchers.delete(watch);
        },
      };
    },
    rows: () => sightings.map(toRow).sort((a, b) => a.from - b.from),
  };
}

/** Writes truth rows, one JSON object a line. */
export function encodeTruth(rows: readonly TruthRow[]): string {
  return rows.map((row) => `${JSON.stringify(row)}\n`).join('');
}

function look(sighting: Sighting, at: number): void {
  const { pump, fault } = sighting;
  if (!fault.shows(pump, at)) return;
  if (at - sighting.lastAt > SAME_STRETCH_MS) {
    sighting.stretches += 1;
    sighting.stretchFrom = at;
  }
  sighting.firstAt ??= at;
  sighting.lastAt = at;
  sighting.longestMs = Math.max(sighting.longestMs, at - sighting.stretchFrom);
  sighting.days.add(Math.floor((at + pump.zone.offsetAt(at)) / DAY_MS));
}

function toRow(sighting: Sighting): TruthRow {
  const { fault, pump, begunAt, endedAt, firstAt } = sighting;
  const { stretchMs = 0, stretches = 0, days = 0 } = fault.needs;
  const wasSeen = firstAt !== undefined;
  const isEnough = sighting.longestMs >= stretchMs && sighting.stretches >= stretches && sighting.days.size >= days;
  return {
    s: pump.spec.serial,
    fault: fault.slug,
    detector: fault.detector,
    cause: fault.causeOn?.(pump.spec) ?? fault.cause,
    from: firstAt ?? begunAt,
    to: endedAt !== null && wasSeen ? sighting.lastAt : endedAt,
    required: wasSeen && isEnough,
    also: fault.also,
    begunAt,
    endedAt,
  };
}
