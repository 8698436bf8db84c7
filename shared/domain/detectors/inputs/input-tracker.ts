import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { isRecord, type Json, restoreState, saveChanges } from '../plain-state.ts';
import { INPUT_COUNT, type InputFacts, perInput } from './input-facts.ts';
import { type ClosedEdge, keepsHours, learnWindows, recordedWindows } from './known-window.ts';

/** One reading's inputs: the masks now and before (undefined for the first), and local time. */
export type InputStep = {
  readonly at: number;
  readonly closed: number;
  readonly before: number | undefined;
  readonly gap: boolean;
  readonly elapsedMs: number;
  readonly localDay: number;
  readonly localMinute: number;
};

/** Follows the edges of one pump's speed inputs and learns the hours of their clocks. */
export type InputTracker = {
  readonly facts: InputFacts;
  readonly read: (step: InputStep) => void;
  readonly learntVersion: () => number;
  readonly saveHot: () => Json;
  readonly saveLearnt: () => Json;
};

/** A closing that lasts this long is an edge and no bounce, ms. */
const SETTLED_MS = 600_000;
const KEPT_EDGES = 28;
/** Across a longer gap nobody knows whether an input stayed closed, ms. */
const LONGEST_UNSEEN_MS = 3 * 3_600_000;

const zeros = (): number[] => perInput(() => 0);

/** `waiting` = closed, seen and not yet settled; `onDay` the local day of the closing. */
type Memory = {
  since: number[];
  seen: number;
  waiting: number;
  onAt: number[];
  offAt: number[];
  onDay: number[];
  onMinute: number[];
};

const restingMemory = (): Memory => ({
  since: zeros(),
  seen: 0,
  waiting: 0,
  onAt: zeros(),
  offAt: zeros(),
  onDay: zeros(),
  onMinute: zeros(),
});

/**
 * A tracker that goes on from what was saved; what cannot be read back is learnt again.
 *
 * @example createInputTracker(context, undefined, undefined).facts.wired // 0b011
 */
export function createInputTracker(context: PumpContext, hot: unknown, learnt: unknown): InputTracker {
  const memory = restoreState(restingMemory(), hot);
  for (const key of ['since', 'onAt', 'offAt', 'onDay', 'onMinute'] as const) memory[key] = padded(memory[key]);
  const edges = parseEdges(learnt);
  let version = 0;
  let fresh = true;
  const facts: InputFacts = {
    wired: wiredMask(context),
    closedEdges: 0,
    openedEdges: 0,
    closedSince: memory.since,
    edgeSeen: zeros().map((_, index) => (memory.seen & (1 << index)) !== 0),
    lastOnAt: memory.onAt,
    lastOffAt: memory.offAt,
    settledOn: 0,
    onMinute: memory.onMinute,
    windows: edges.map((list, index) => windowsOf(context, index + 1, list)),
    windowsChanged: true,
  };

  function relearn(index: number): void {
    facts.windows[index] = windowsOf(context, index + 1, edges[index] ?? []);
    facts.windowsChanged = true;
    version += 1;
  }

  function settle(index: number): void {
    const bit = 1 << index;
    memory.waiting &= ~bit;
    facts.settledOn |= bit;
    const edge: ClosedEdge = [memory.onDay[index] ?? 0, Math.round((memory.onMinute[index] ?? 0) * 10) / 10, 0];
    edges[index] = [...(edges[index] ?? []), edge].slice(-KEPT_EDGES);
    relearn(index);
  }

  /** The closing that ended is an edge only if it lasted; then its length is learnt too. */
  function open(index: number, at: number): void {
    const bit = 1 << index;
    const lasted = (at - (memory.since[index] ?? at)) / 60_000;
    const list = edges[index] ?? [];
    const [day, minute] = list.at(-1) ?? [0, 0];
    const isOfEdge = (memory.seen & bit) !== 0 && (memory.waiting & bit) === 0 && day === memory.onDay[index];
    if (isOfEdge) {
      edges[index] = [...list.slice(0, -1), [day, minute, Math.round(lasted * 10) / 10]];
      relearn(index);
    }
    memory.since[index] = 0;
    memory.offAt[index] = at;
    memory.waiting &= ~bit;
  }

  function close(index: number, step: InputStep, seen: boolean): void {
    const bit = 1 << index;
    memory.since[index] = step.at;
    memory.onAt[index] = step.at;
    memory.onDay[index] = step.localDay;
    memory.onMinute[index] = step.localMinute;
    memory.seen = seen ? memory.seen | bit : memory.seen & ~bit;
    memory.waiting = seen ? memory.waiting | bit : memory.waiting & ~bit;
    facts.edgeSeen[index] = seen;
  }

  return {
    facts,
    read: (step) => {
      const { at, closed, before, gap } = step;
      const known = before !== undefined && !gap;
      facts.closedEdges = known ? closed & ~before : 0;
      facts.openedEdges = known ? before & ~closed : 0;
      facts.settledOn = 0;
      facts.windowsChanged = fresh;
      fresh = false;
      const lostSight = gap && step.elapsedMs > LONGEST_UNSEEN_MS;
      const changed = before === undefined ? closed : (closed ^ before) | (lostSight ? closed : 0);
      if (changed === 0 && memory.waiting === 0) return;
      for (let index = 0; index < INPUT_COUNT; index += 1) {
        const bit = 1 << index;
        if ((changed & bit) !== 0 && (closed & bit) !== 0) close(index, step, known);
        else if ((changed & bit) !== 0) open(index, at);
        else if ((memory.waiting & bit) !== 0 && at - (memory.since[index] ?? at) >= SETTLED_MS) settle(index);
      }
    },
    learntVersion: () => version,
    saveHot: () => saveChanges(restingMemory(), memory) ?? {},
    saveLearnt: () => edges.map((list) => list.map((edge) => [...edge])),
  };
}

function windowsOf(context: PumpContext, input: number, edges: readonly ClosedEdge[]): InputFacts['windows'][number] {
  const recorded = recordedWindows(context, input);
  if (recorded.length > 0) return recorded;
  return keepsHours(context, input) ? learnWindows(input, edges) : [];
}

/** The inputs that have a speed, as a mask. */
export function wiredMask({ settings, traits }: PumpContext): number {
  let mask = 0;
  settings.inputs.slice(0, traits.inputCount).forEach((rpm, index) => {
    if (rpm !== null) mask |= 1 << index;
  });
  return mask;
}

function padded(values: readonly Json[]): number[] {
  return zeros().map((_, index) => (typeof values[index] === 'number' ? values[index] : 0));
}

function parseEdges(saved: unknown): (readonly ClosedEdge[])[] {
  const lists = Array.isArray(saved) ? saved : [];
  return zeros().map((_, index) => {
    const list: unknown = lists[index];
    return Array.isArray(list) ? list.filter(isEdge) : [];
  });
}

function isEdge(value: unknown): value is ClosedEdge {
  return (
    Array.isArray(value) && value.length === 3 && value.every((one) => typeof one === 'number') && !isRecord(value)
  );
}
