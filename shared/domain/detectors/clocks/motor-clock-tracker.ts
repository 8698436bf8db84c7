import type { Control } from '#shared/domain/control/create-control.ts';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { DAY_MINUTES } from '#shared/domain/time/local-time.ts';
import type { Facts } from '../facts.ts';
import { type Json, restoreState, saveChanges } from '../plain-state.ts';

/** What is known of the motor's own clock. */
export type MotorClockFacts = {
  /** Minutes it is ahead of wall time. */
  offsetMinutes: number;
  /** It says so itself, its program's edges show it, or nothing is known. */
  basis: 'says' | 'edges' | 'none';
  /**
   * By so many minutes it may be off because of what happened since its last edge: a power cut, or daylight saving,
   * which a motor does not know. 0 where it shows its own time.
   */
  suspectMinutes: number;
  /** When it was last seen to be right within a quarter of an hour, ms, 0 = never; its offset and the pad's zone then. */
  goodAt: number;
  goodOffsetMinutes: number;
  goodZoneMinutes: number;
};

/** `late` = minutes by which the last edges came after the program's, newest last. */
/** `good` = instant, offset and zone of the last right look. */
type Memory = {
  late: number[];
  wasStanding: boolean;
  offset: number | null;
  suspect: number;
  zone: number | null;
  good: number[];
};

const restingMemory = (): Memory => ({
  late: [],
  wasStanding: true,
  offset: null,
  suspect: 0,
  zone: null,
  good: [0, 0, 0],
});

/** Edges this far off another one of their kind are no edges of the program. */
const FARTHEST_MINUTES = 360;
const EDGES = 3;
const AGREE_MINUTES = 10;
const RIGHT_MINUTES = 15;
const SHORTEST_CUT_MINUTES = 15;
const MOST_SUSPECT_MINUTES = 720;
/** Inputs must have been open for this long, or the motor was following them, ms. */
const OPEN_FOR_MS = 600_000;
const WEEK_MINUTES = 7 * DAY_MINUTES;

/** Learns a motor clock's offset from the times at which it starts and ends its program. */
export type MotorClockTracker = {
  readonly facts: MotorClockFacts;
  readonly read: (facts: Facts) => void;
  readonly save: () => Json;
};

/**
 * A tracker that goes on from what was saved, and tells control what it learns.
 *
 * @example createMotorClockTracker(context, control, undefined).facts.basis // 'none'
 */
export function createMotorClockTracker(context: PumpContext, control: Control, saved: unknown): MotorClockTracker {
  const memory = restoreState(restingMemory(), saved);
  const edges = programEdges(context);
  const facts: MotorClockFacts = {
    offsetMinutes: memory.offset ?? 0,
    basis: memory.offset === null ? 'none' : 'edges',
    suspectMinutes: memory.suspect,
    goodAt: memory.good[0] ?? 0,
    goodOffsetMinutes: memory.good[1] ?? 0,
    goodZoneMinutes: memory.good[2] ?? 0,
  };

  function noteGood(at: number, offset: number, zone: number): void {
    if (Math.abs(offset) > RIGHT_MINUTES) return;
    memory.good[0] = facts.goodAt = at;
    memory.good[1] = facts.goodOffsetMinutes = offset;
    memory.good[2] = facts.goodZoneMinutes = zone;
  }

  function takeEdge(minute: number, among: readonly number[], { now, zoneOffsetMinutes }: Facts): void {
    let nearest: number | undefined;
    for (const edge of among) {
      const late = weekDifference(edge, minute);
      if (nearest === undefined || Math.abs(late) < Math.abs(nearest)) nearest = late;
    }
    if (nearest === undefined || Math.abs(nearest) > FARTHEST_MINUTES) return;
    if (Math.abs(nearest + (memory.offset ?? 0)) <= AGREE_MINUTES) memory.suspect = 0;
    noteGood(now, 0 - nearest, zoneOffsetMinutes);
    memory.late = [...memory.late, Math.round(nearest * 10) / 10].slice(-EDGES);
    const spread = Math.max(...memory.late) - Math.min(...memory.late);
    if (memory.late.length < EDGES || spread > AGREE_MINUTES) return;
    const middle = memory.late.toSorted((left, right) => left - right)[1] ?? 0;
    memory.offset = 0 - middle;
    memory.suspect = 0;
    control.setMotorClockOffset(memory.offset);
  }

  return {
    facts,
    read: (known) => {
      const { reading, control: answer, inputs, gap, now, localWeekday, localMinute } = known;
      const turned = memory.wasStanding !== answer.standing && !gap;
      memory.wasStanding = answer.standing;
      if (reading.motorClockMinute !== undefined && answer.motorClockKnown) {
        facts.offsetMinutes = answer.motorClockOffsetMinutes;
        facts.basis = 'says';
        facts.suspectMinutes = 0;
        noteGood(now, facts.offsetMinutes, known.zoneOffsetMinutes);
        return;
      }
      suspect(memory, known);
      if (turned && isOfProgram(reading.reportedSource) && areOpen(reading.closedInputs, inputs.lastOffAt, now)) {
        takeEdge(localWeekday * DAY_MINUTES + localMinute, answer.standing ? edges.stops : edges.starts, known);
      }
      facts.offsetMinutes = memory.offset ?? 0;
      facts.basis = memory.offset === null ? 'none' : 'edges';
      facts.suspectMinutes = memory.suspect;
    },
    save: () => saveChanges(restingMemory(), memory) ?? {},
  };
}

/** A cut may have stopped the clock for as long as it lasted; a shift of the wall's clock leaves it behind. */
function suspect(memory: Memory, { link, zoneOffsetMinutes }: Facts): void {
  const shift = memory.zone === null ? 0 : Math.abs(zoneOffsetMinutes - memory.zone);
  memory.zone = zoneOffsetMinutes;
  const outage = link.outageEnded ? link.outages.at(-1) : undefined;
  const counts = outage !== undefined && (outage.booted || !link.reportsBoots);
  const cut = counts ? (outage.to - outage.from) / 60_000 : 0;
  if (shift > 0 || cut >= SHORTEST_CUT_MINUTES) {
    memory.suspect = Math.min(
      MOST_SUSPECT_MINUTES,
      Math.ceil(memory.suspect + shift + (cut >= SHORTEST_CUT_MINUTES ? cut : 0)),
    );
  }
}

/**
 * Whether an instant lies so near an edge of the program that a clock which may be off explains either speed.
 *
 * @example isNearSuspectEdge(facts) // true 40 minutes after a start, the day after a cut of an hour
 */
export function isNearSuspectEdge({ motorClock, control, now }: Facts): boolean {
  if (motorClock.suspectMinutes === 0) return false;
  const near = (motorClock.suspectMinutes + AGREE_MINUTES) * 60_000;
  const { programEdgeBefore, programEdgeAfter } = control;
  if (programEdgeBefore !== undefined && now - programEdgeBefore < near) return true;
  return programEdgeAfter !== undefined && programEdgeAfter - now < near;
}

function isOfProgram(source: Facts['reading']['reportedSource']): boolean {
  return source === undefined || source === 'program' || source === 'prime' || source === 'off';
}

function areOpen(closed: number, lastOffAt: readonly number[], now: number): boolean {
  return closed === 0 && lastOffAt.every((at) => now - at >= OPEN_FOR_MS);
}

/** Minutes of the week, Monday first, at which the program as a whole begins and ends. */
function programEdges({ settings }: PumpContext): {
  readonly starts: readonly number[];
  readonly stops: readonly number[];
} {
  const due = new Uint8Array(WEEK_MINUTES);
  for (const { days, fromMinute, toMinute } of settings.program) {
    const lasts = toMinute > fromMinute ? toMinute - fromMinute : toMinute + DAY_MINUTES - fromMinute;
    days.forEach((on, weekday) => {
      if (!on) return;
      for (let minute = 0; minute < lasts; minute += 1)
        due[(weekday * DAY_MINUTES + fromMinute + minute) % WEEK_MINUTES] = 1;
    });
  }
  const starts: number[] = [];
  const stops: number[] = [];
  for (let minute = 0; minute < WEEK_MINUTES; minute += 1) {
    const before = due[(minute + WEEK_MINUTES - 1) % WEEK_MINUTES];
    if (due[minute] === 1 && before === 0) starts.push(minute);
    if (due[minute] === 0 && before === 1) stops.push(minute);
  }
  return { starts, stops };
}

function weekDifference(from: number, to: number): number {
  const forward = (((to - from) % WEEK_MINUTES) + WEEK_MINUTES) % WEEK_MINUTES;
  return forward > WEEK_MINUTES / 2 ? forward - WEEK_MINUTES : forward;
}
