import type { Source } from '../readings/reading.ts';
import { HOUR_MS } from '../time/local-time.ts';
import type { Because, Decision } from './decision.ts';
import type { MotorSettings, MotorTraits } from './motor-settings.ts';
import { findSlotIndex, type ProgramTimeline, programTimeline } from './program-timeline.ts';
import type { Situation } from './situation.ts';
import { inputSpeed, listClosedInputs, winningInput } from './winning-input.ts';

/** How long past its set time a motor that says it primes is believed, s. */
export const PRIME_GRACE_SECONDS = 30;

type Claim = { readonly rpm: number; readonly until: number | undefined; readonly because: Because };
type Case = {
  readonly settings: MotorSettings;
  readonly traits: MotorTraits;
  readonly situation: Situation;
  readonly timeline: ProgramTimeline;
  readonly winner: number;
};

/** What each source asks for; undefined = nothing. The order in which they are heard is the model's, not this table's. */
const CLAIMS: Record<Exclude<Source, 'prime'>, (known: Case) => Claim | undefined> = {
  fault: ({ situation: { fault } }) =>
    fault && { rpm: 0, until: undefined, because: { kind: 'fault', code: fault.code } },
  stop: ({ situation, traits, winner }) =>
    situation.stopped === true && (winner === 0 || traits.stopBeatsInputs)
      ? { rpm: 0, until: undefined, because: { kind: 'stop' } }
      : undefined,
  input: ({ settings, situation, winner }) => {
    if (winner === 0) return undefined;
    const others = listClosedInputs(situation.closedInputs).filter((input) => input !== winner);
    return {
      rpm: inputSpeed(settings.inputs, winner),
      until: undefined,
      because: { kind: 'input', input: winner, others },
    };
  },
  keypad: ({ situation: { keypadRpm } }) =>
    keypadRpm === undefined ? undefined : { rpm: keypadRpm, until: undefined, because: { kind: 'keypad' } },
  timed: ({ settings: { timed }, situation: { at, timedSince } }) => {
    if (timed === null || timedSince === undefined) return undefined;
    const until = timedSince + timed.minutes * 60_000;
    if (at >= until) return undefined;
    return { rpm: timed.rpm, until, because: { kind: 'timed', endsAt: until } };
  },
  program: (known) => programClaim(known),
  freeze: ({ settings: { freeze }, situation: { at, freezeSince }, timeline }) => {
    if (freeze === null || freezeSince === undefined || at >= freezeSince + HOUR_MS) return undefined;
    const until = earliest(freezeSince + HOUR_MS, nextProgramStart(timeline, at));
    return { rpm: freeze.rpm, until, because: { kind: 'freeze' } };
  },
  off: ({ situation, timeline }) => ({
    rpm: 0,
    until: nextProgramStart(timeline, situation.at),
    because: { kind: 'off' },
  }),
};

/**
 * What a motor should be doing in a situation, and why: the first source, in the model's order, that asks for
 * something. Prime comes before any source that asks for a speed after a start from standstill; a closed input with
 * a speed beats program, keypad and timed run, and of several the highest wins (common practice in the trade, no
 * source). Speeds in rpm, `until` in ms. A situation that nothing fits is `off`, 0 rpm.
 *
 * `timeline` may be passed to save laying out the program again; it must hold `situation.at`.
 *
 * @example decide(settings, DEFAULT_TRAITS, { at, zone: 'America/Phoenix', motorClockOffsetMinutes: 0, closedInputs: 1 }).source // 'input'
 */
export function decide(
  settings: MotorSettings,
  traits: MotorTraits,
  situation: Situation,
  timeline?: ProgramTimeline,
): Decision {
  const known: Case = {
    settings,
    traits,
    situation,
    timeline: timeline ?? timelineOf(settings, traits, situation),
    winner: winningInput(settings.inputs.slice(0, traits.inputCount), situation.closedInputs),
  };
  return decideFrom(known, 0);
}

function decideFrom(known: Case, position: number): Decision {
  const { precedence } = known.traits;
  for (let index = position; index < precedence.length; index += 1) {
    const source = precedence[index] ?? 'off';
    if (source === 'prime') {
      const primed = decidePrime(known, decideFrom(known, index + 1));
      if (primed !== undefined) return primed;
      continue;
    }
    const claim = CLAIMS[source](known);
    if (claim !== undefined) return { source, ...claim, lockedBy: lockedBy(known, source) };
  }
  return { source: 'off', rpm: 0, until: undefined, lockedBy: undefined, because: { kind: 'off' } };
}

function decidePrime({ settings: { prime }, situation }: Case, next: Decision): Decision | undefined {
  if (prime === null || situation.prime === undefined) return undefined;
  const { since, claimed } = situation.prime;
  if (next.rpm <= 0 && !claimed) return undefined;
  const seconds = prime.seconds + (claimed ? PRIME_GRACE_SECONDS : 0);
  if (situation.at >= since + seconds * 1000) return undefined;
  const end = since + prime.seconds * 1000;
  return {
    source: 'prime',
    rpm: prime.rpm,
    lockedBy: next.lockedBy,
    until: earliest(
      situation.at < end ? end : since + seconds * 1000,
      next.source === 'program' ? next.until : undefined,
    ),
    because: { kind: 'prime', endsAt: end, next: next.source },
  };
}

function programClaim({ settings, situation: { at }, timeline }: Case): Claim | undefined {
  const index = findSlotIndex(timeline, at);
  const slot = timeline.slots[index];
  const entry = slot === undefined ? undefined : settings.program[slot.entry];
  if (slot === undefined || entry === undefined) return undefined;
  let end = index;
  while (timeline.slots[end + 1]?.rpm === slot.rpm && timeline.slots[end + 1]?.entry !== -1) end += 1;
  const endsWith = timeline.slots[end + 1] === undefined ? undefined : timeline.slots[end]?.to;
  return {
    rpm: slot.rpm,
    until: endsWith,
    because: { kind: 'program', entry: slot.entry, fromMinute: entry.fromMinute, toMinute: entry.toMinute },
  };
}

function nextProgramStart(timeline: ProgramTimeline, at: number): number | undefined {
  return timeline.slots.find((slot) => slot.from > at && slot.entry !== -1)?.from;
}

/** The input number that the keypad's speed keys cannot override, whichever source is heard first. */
function lockedBy({ traits: { precedence }, winner }: Case, source: Source): number | undefined {
  if (winner === 0 || source === 'fault' || source === 'stop') return undefined;
  return precedence.indexOf('input') < precedence.indexOf('keypad') ? winner : undefined;
}

function earliest(first: number, second: number | undefined): number {
  return second === undefined ? first : Math.min(first, second);
}

function timelineOf(settings: MotorSettings, traits: MotorTraits, situation: Situation): ProgramTimeline {
  const { zone, motorClockOffsetMinutes, at } = situation;
  return programTimeline(settings.program, traits.programOverlap, zone, motorClockOffsetMinutes, at);
}
