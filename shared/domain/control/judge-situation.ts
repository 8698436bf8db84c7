import type { Reading } from '../readings/reading.ts';
import { HOUR_MS } from '../time/local-time.ts';
import type { ControlState } from './control-state.ts';
import { decide, PRIME_GRACE_SECONDS } from './decide.ts';
import type { Decision } from './decision.ts';
import { motorClockOffset } from './motor-clock-offset.ts';
import { findPrimeStart, reviewAssumedStart } from './prime-start.ts';
import { type ProgramEdges, programEdges } from './program-edges.ts';
import { findSlotIndex, type ProgramTimeline, programTimeline } from './program-timeline.ts';
import type { PumpContext } from './pump-context.ts';
import type { Situation } from './situation.ts';
import { speedTolerance } from './speed-tolerance.ts';
import { trackClaims, trackFreeze } from './track-claims.ts';
import { type Step, trackDue, trackMotion } from './track-start.ts';
import { winningInput } from './winning-input.ts';

const NOTHING: Decision = { source: 'off', rpm: 0, until: undefined, lockedBy: undefined, because: { kind: 'off' } };

/** The worked-out part of control, good until `validUntil` unless a reading changes something that matters. */
export type Judgement = {
  decision: Decision;
  due: Decision;
  winner: number;
  toleranceRpm: number;
  /** What is due but for a prime, rpm. */
  baseRpm: number;
  primeEndsAt: number | undefined;
  edges: ProgramEdges;
  validUntil: number;
  /** Works everything out anew for a reading, and moves the state along. */
  renew(step: Step): void;
  /** To be called once a reading's ramp is judged. */
  review(reading: Reading): void;
  /** Makes the next reading work it out anew. */
  expire(): void;
};

type Known = {
  readonly context: PumpContext;
  readonly state: ControlState;
  readonly timeline: ProgramTimeline;
  readonly winner: number;
};

/** The judgement over one pump's state: a saved one is worked out again, under whatever is commissioned now. */
export function createJudgement(context: PumpContext, state: ControlState): Judgement {
  let timeline: ProgramTimeline | undefined;
  let timelineOffset = 0;

  function timelineAt(at: number): ProgramTimeline {
    const offset = motorClockOffset(state);
    if (timeline !== undefined && timelineOffset === offset && at >= timeline.from && at < timeline.freshUntil)
      return timeline;
    const { settings, traits, zone } = context;
    timeline = programTimeline(settings.program, traits.programOverlap, zone, offset, at);
    timelineOffset = offset;
    return timeline;
  }

  const judgement: Judgement = {
    decision: NOTHING,
    due: NOTHING,
    winner: 0,
    toleranceRpm: speedTolerance(0),
    baseRpm: 0,
    primeEndsAt: undefined,
    edges: { before: undefined, after: undefined },
    validUntil: Number.NEGATIVE_INFINITY,
    renew: (step) =>
      renew(
        judgement,
        { context, state, timeline: timelineAt(step.reading.at), winner: winnerOf(context, step.reading) },
        step,
      ),
    review: (reading) => reviewAssumedStart(context.settings.prime, state, reading, judgement.baseRpm),
    expire() {
      judgement.validUntil = Number.NEGATIVE_INFINITY;
    },
  };
  if (state.seen) judgement.renew({ reading: lastReading(state), standing: state.standing, gap: false });
  return judgement;
}

/** What a saved state still knows of its last reading: enough to work the same answer out again. */
function lastReading({ at, rpm, closedInputs, reported, fault }: ControlState): Reading {
  return {
    at,
    rpm,
    closedInputs,
    activeInput: 0,
    watts: 0,
    reportedSource: reported ?? undefined,
    fault: fault ?? undefined,
  };
}

function winnerOf({ settings, traits }: PumpContext, { closedInputs }: Reading): number {
  return winningInput(settings.inputs.slice(0, traits.inputCount), closedInputs);
}

function renew(judgement: Judgement, known: Known, step: Step): void {
  const { context, state, timeline, winner } = known;
  const { settings, traits } = context;
  const { reading } = step;
  const moved = state.standing !== step.standing || step.gap;
  trackMotion(state, step);
  trackClaims(state, reading, winner, traits);
  const bare = bareSituation(known, reading);
  const asked = decide(settings, traits, bare, timeline);
  trackFreeze(state, reading, settings.freeze, asked.source === 'off');
  const wanted: Situation = { ...bare, freezeSince: state.freezeSince ?? undefined };
  const base = state.freezeSince === null ? asked : decide(settings, traits, wanted, timeline);
  const slotIndex = findSlotIndex(timeline, reading.at);
  trackDue(state, step, base.rpm, base.source === 'program' ? timeline.slots[slotIndex] : undefined);
  const primed: Situation = { ...wanted, prime: findPrimeStart(settings.prime, state, reading, base.rpm) };
  const due = decide(settings, traits, primed, timeline);
  const held = heldSituation(primed, reading, step.standing);
  const decision = held === undefined ? due : decide(settings, traits, held, timeline);

  noteChange(state, { decision, due, moved, winner }, reading.at);
  judgement.decision = decision;
  judgement.due = due;
  judgement.winner = winner;
  judgement.toleranceRpm = speedTolerance(due.rpm);
  judgement.baseRpm = base.rpm;
  judgement.primeEndsAt = due.because.kind === 'prime' ? due.because.endsAt : undefined;
  judgement.edges = programEdges(timeline, slotIndex, reading.at);
  judgement.validUntil = nextChange(known, primed, slotIndex, reading.at);
  state.closedInputs = reading.closedInputs;
  state.reported = reading.reportedSource ?? null;
  state.fault = reading.fault ?? null;
}

/** What asks for a speed, without prime, freeze protection, keypad stop and fault. */
function bareSituation({ context, state }: Known, reading: Reading): Situation {
  return {
    at: reading.at,
    zone: context.zone,
    motorClockOffsetMinutes: motorClockOffset(state),
    closedInputs: reading.closedInputs,
    keypadRpm: state.keypadRpm ?? undefined,
    timedSince: state.timedPausedAt === null ? (state.timedSince ?? undefined) : undefined,
  };
}

/** The situation with a believed keypad stop or fault; undefined where there is neither. */
function heldSituation(primed: Situation, reading: Reading, standing: boolean): Situation | undefined {
  const { reportedSource, fault } = reading;
  if (reportedSource === 'stop') return { ...primed, stopped: true };
  const faulted = reportedSource === 'fault' || (fault !== undefined && reportedSource === undefined && standing);
  return faulted ? { ...primed, fault: { code: fault } } : undefined;
}

type Change = { readonly decision: Decision; readonly due: Decision; readonly moved: boolean; readonly winner: number };

function noteChange(state: ControlState, { decision, due, moved, winner }: Change, at: number): void {
  const followsShaft = due.source === 'keypad' && state.dueSource === 'keypad';
  const sameSpeed = due.rpm === state.dueRpm || followsShaft;
  const same =
    decision.source === state.source && due.source === state.dueSource && sameSpeed && state.winner === winner;
  if (!same || moved) {
    state.changedAt = at;
    state.rampOver = false;
  }
  state.source = decision.source;
  state.dueSource = due.source;
  state.dueRpm = due.rpm;
  state.winner = winner;
}

/** The first instant at which the clock alone can change the answer. */
function nextChange(
  { context, state, timeline }: Known,
  { prime: start }: Situation,
  slotIndex: number,
  at: number,
): number {
  const { prime, timed } = context.settings;
  let next = Math.min(timeline.slots[slotIndex]?.to ?? at, timeline.freshUntil);
  const consider = (instant: number): void => {
    if (instant > at && instant < next) next = instant;
  };
  if (prime !== null && start !== undefined) {
    consider(start.since + prime.seconds * 1000);
    consider(start.since + (prime.seconds + PRIME_GRACE_SECONDS) * 1000);
  }
  if (timed !== null && state.timedSince !== null) consider(state.timedSince + timed.minutes * 60_000);
  if (state.freezeSince !== null) consider(state.freezeSince + HOUR_MS);
  return next;
}
