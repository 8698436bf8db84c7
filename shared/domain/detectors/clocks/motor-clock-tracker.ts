import type { Control } from '#shared/domain/control/create-control.ts';
import { isNearProgramEdge } from '#shared/domain/control/is-near-program-edge.ts';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import type { Facts } from '../facts.ts';
import { type Json, restoreState, saveChanges } from '../plain-state.ts';
import { latenessOf, type ProgramEdge, programEdges } from './program-edges.ts';
import { type ProgramWatch, watchProgram } from './watch-program.ts';

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
  /** When it was last seen to be right within a quarter of an hour, ms, 0 = never, and its offset then. */
  goodAt: number;
  goodOffsetMinutes: number;
};

/**
 * `late` = minutes by which the last edges came after the program's, newest last; `good` = instant and offset of the
 * last right look.
 */
type Memory = {
  late: number[];
  watch: ProgramWatch;
  offset: number | null;
  suspect: number;
  zone: number | null;
  good: number[];
};

const restingMemory = (): Memory => ({
  late: [],
  watch: { speed: null, leftAt: 0, leftMinute: 0 },
  offset: null,
  suspect: 0,
  zone: null,
  good: [0, 0],
});

/** Edges this far off another one of their kind are no edges of the program. */
const FARTHEST_MINUTES = 360;
const EDGES = 3;
const AGREE_MINUTES = 10;
const RIGHT_MINUTES = 15;
const SET_MINUTES = 5;
const SHORTEST_CUT_MINUTES = 15;
const MOST_SUSPECT_MINUTES = 720;

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
  const { watch } = memory;
  const facts: MotorClockFacts = {
    offsetMinutes: memory.offset ?? 0,
    basis: memory.offset === null ? 'none' : 'edges',
    suspectMinutes: memory.suspect,
    goodAt: memory.good[0] ?? 0,
    goodOffsetMinutes: memory.good[1] ?? 0,
  };

  function noteGood(at: number, offset: number): void {
    if (Math.abs(offset) > RIGHT_MINUTES) return;
    memory.good[0] = facts.goodAt = at;
    memory.good[1] = facts.goodOffsetMinutes = offset;
  }

  function takeEdge(edge: ProgramEdge, { now }: Facts): void {
    const late = latenessOf(edges, edge);
    if (late === undefined || Math.abs(late) > FARTHEST_MINUTES) return;
    if (Math.abs(late + (memory.offset ?? 0)) <= AGREE_MINUTES) memory.suspect = 0;
    noteGood(now, 0 - late);
    // A clock that was off and is on time to the minute has been set: no second edge is needed to believe that.
    if (Math.abs(memory.offset ?? 0) > RIGHT_MINUTES && Math.abs(late) <= SET_MINUTES) {
      memory.late = [Math.round(late * 10) / 10];
      learn(0 - late);
      return;
    }
    memory.late = [...memory.late, Math.round(late * 10) / 10].slice(-EDGES);
    const spread = Math.max(...memory.late) - Math.min(...memory.late);
    if (memory.late.length < EDGES || spread > AGREE_MINUTES) return;
    const middle = memory.late.toSorted((left, right) => left - right)[1] ?? 0;
    learn(0 - middle);
  }

  function learn(offset: number): void {
    memory.offset = offset;
    memory.suspect = 0;
    control.setMotorClockOffset(offset);
  }

  return {
    facts,
    read: (known) => {
      const { reading, control: answer, now } = known;
      if (reading.motorClockMinute !== undefined && answer.motorClockKnown) {
        facts.offsetMinutes = answer.motorClockOffsetMinutes;
        facts.basis = 'says';
        facts.suspectMinutes = 0;
        noteGood(now, facts.offsetMinutes);
        return;
      }
      suspect(memory, known);
      const edge = watchProgram(watch, known);
      if (edge !== undefined) takeEdge(edge, known);
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
export function isNearSuspectEdge({ motorClock, control }: Facts): boolean {
  const { suspectMinutes } = motorClock;
  return suspectMinutes !== 0 && isNearProgramEdge(control, suspectMinutes + AGREE_MINUTES);
}
