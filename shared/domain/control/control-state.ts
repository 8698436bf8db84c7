import type { Source } from '../readings/reading.ts';

/**
 * What control remembers of one pump between readings: plain JSON, instants in ms, speeds in rpm. Fields written by
 * every reading are plain numbers, so that writing them allocates nothing.
 */
export type ControlState = {
  /** Whether there was a reading yet; `at`, `rpm` and the rest of the last reading count only then. */
  seen: boolean;
  at: number;
  rpm: number;
  standing: boolean;
  closedInputs: number;
  reported: Source | null;
  fault: string | null;
  /** The last start from standstill; null while standing and where it was not seen. */
  startedAt: number | null;
  /** Since when the motor may be in a prime whose start was not seen. */
  assumedSince: number | null;
  /** Since when something asks for a speed. */
  dueSince: number | null;
  /** When source, expected speed, winner or motion last changed; the ramp is counted from here. */
  changedAt: number;
  rampOver: boolean;
  /** Since when the motor says that it primes. */
  primeSaidSince: number | null;
  keypadRpm: number | null;
  timedSince: number | null;
  timedPausedAt: number | null;
  freezeSince: number | null;
  /** Minutes the motor's clock is ahead of wall time: what it says itself, what was learnt from outside. */
  saidOffset: number | null;
  doubtedOffset: number | null;
  learntOffset: number | null;
  zoneOffset: number | null;
  /** The last answer, to notice a change. */
  source: Source | null;
  dueSource: Source | null;
  dueRpm: number;
  winner: number;
};

/** The state before the first reading. */
export function freshControlState(): ControlState {
  return {
    seen: false,
    at: 0,
    rpm: 0,
    standing: true,
    closedInputs: 0,
    reported: null,
    fault: null,
    startedAt: null,
    assumedSince: null,
    dueSince: null,
    changedAt: 0,
    rampOver: false,
    primeSaidSince: null,
    keypadRpm: null,
    timedSince: null,
    timedPausedAt: null,
    freezeSince: null,
    saidOffset: null,
    doubtedOffset: null,
    learntOffset: null,
    zoneOffset: null,
    source: null,
    dueSource: null,
    dueRpm: 0,
    winner: 0,
  };
}

/** A saved state: plain JSON without the empty fields, since every pump's is written at every commit. */
export type SavedControl = Readonly<Record<string, string | number | boolean>>;

export function saveControlState(state: ControlState): SavedControl {
  return Object.fromEntries(
    Object.entries(state).filter((field): field is [string, string | number | boolean] => field[1] !== null),
  );
}

/**
 * A saved state read back from JSON; undefined where its shape is not this version's, so that control starts afresh.
 *
 * @example parseControlState(JSON.parse(JSON.stringify(control.save())))
 */
export function parseControlState(saved: unknown): ControlState | undefined {
  if (typeof saved !== 'object' || saved === null) return undefined;
  const fresh: Record<string, unknown> = freshControlState();
  const given: Record<string, unknown> = { ...saved };
  const fits = Object.entries(fresh).every(([name, value]) => hasKind(name, given[name] ?? null, value));
  if (!fits) return undefined;
  return Object.fromEntries(Object.keys(fresh).map((name) => [name, given[name] ?? null])) as ControlState;
}

const WORDS: ReadonlySet<string> = new Set(['reported', 'fault', 'source', 'dueSource']);

/** Null in the fresh state marks a field that may be empty. */
function hasKind(name: string, value: unknown, fresh: unknown): boolean {
  if (fresh === null && value === null) return true;
  if (WORDS.has(name)) return typeof value === 'string';
  return typeof fresh === 'boolean' ? typeof value === 'boolean' : Number.isFinite(value);
}
