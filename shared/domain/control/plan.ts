import type { Source } from '../readings/reading.ts';
import { decide } from './decide.ts';
import type { Because, Decision } from './decision.ts';
import type { MotorSettings, MotorTraits } from './motor-settings.ts';
import { findSlotIndex, type ProgramTimeline, programTimeline } from './program-timeline.ts';
import type { Situation } from './situation.ts';
import { type InputSpan, type InputWindow, listInputSpans } from './window-spans.ts';
import { winningInput } from './winning-input.ts';

/** A run expected ahead: half-open, ms; `rpm` the expected speed, `closedInputs` the mask, `activeInput` the winner or 0. */
export type PlannedRun = {
  readonly from: number;
  readonly to: number;
  readonly source: Source;
  readonly rpm: number;
  readonly closedInputs: number;
  readonly activeInput: number;
  readonly because: Because;
};

/** Where and by which clock a plan runs. */
export type PlanContext = { readonly zone: string; readonly motorClockOffsetMinutes: number };

type Planner = {
  readonly settings: MotorSettings;
  readonly traits: MotorTraits;
  readonly context: PlanContext;
  readonly spans: readonly InputSpan[];
  timeline: ProgramTimeline;
  primeSince: number | undefined;
  running: boolean;
};

/**
 * The runs a motor is expected to make between two instants (ms) that may be a day or a year apart: program, prime
 * at every start, and inputs by their windows (recorded, learnt, or both). The runs follow one another without a
 * gap. Nothing that is not planned is in it: no freeze protection, no timed run, no keypad. Empty where `from` is
 * not before `to`.
 *
 * @example plan(settings, traits, { zone: 'America/Phoenix', motorClockOffsetMinutes: 0 }, dayFrom, dayTo, [])
 */
export function plan(
  settings: MotorSettings,
  traits: MotorTraits,
  context: PlanContext,
  from: number,
  to: number,
  windows: readonly InputWindow[],
): PlannedRun[] {
  if (!(from < to)) return [];
  // A start longer ago than the prime lasts no longer shows.
  let at = from - (settings.prime?.seconds ?? 0) * 1000;
  const planner = startPlanner(settings, traits, context, at, listInputSpans(context.zone, windows, at, to));
  const runs: PlannedRun[] = [];
  while (at < to) {
    const closedInputs = closedAt(planner.spans, at);
    const decision = stepTo(planner, at, closedInputs);
    const next = Math.min(to, nextEdge(planner, decision, at));
    if (next > from) addRun(runs, planned(planner, decision, closedInputs, Math.max(at, from), next));
    at = next;
  }
  return runs;
}

function startPlanner(
  settings: MotorSettings,
  traits: MotorTraits,
  context: PlanContext,
  at: number,
  spans: readonly InputSpan[],
): Planner {
  const timeline = layOut(settings, traits, context, at);
  const planner: Planner = { settings, traits, context, spans, timeline, primeSince: undefined, running: false };
  planner.running = decide(settings, traits, situationAt(planner, at, closedAt(spans, at)), timeline).rpm > 0;
  return planner;
}

function layOut(settings: MotorSettings, traits: MotorTraits, context: PlanContext, at: number): ProgramTimeline {
  return programTimeline(settings.program, traits.programOverlap, context.zone, context.motorClockOffsetMinutes, at);
}

function situationAt({ context, primeSince }: Planner, at: number, closedInputs: number): Situation {
  const prime = primeSince === undefined ? undefined : { since: primeSince, claimed: false };
  return { at, ...context, closedInputs, prime };
}

function closedAt(spans: readonly InputSpan[], at: number): number {
  let mask = 0;
  for (const span of spans) {
    if (span.from > at) break;
    if (span.to > at) mask |= 1 << (span.input - 1);
  }
  return mask;
}

/** Moves the planner to an instant: lays the program out anew where it must, and sees starts and stops. */
function stepTo(planner: Planner, at: number, closedInputs: number): Decision {
  const { settings, traits, context } = planner;
  if (at >= planner.timeline.freshUntil) planner.timeline = layOut(settings, traits, context, at);
  const due = decide(settings, traits, situationAt(planner, at, closedInputs), planner.timeline);
  if (due.rpm > 0 && planner.running) return due;
  planner.primeSince = due.rpm > 0 ? at : undefined;
  planner.running = due.rpm > 0;
  return decide(settings, traits, situationAt(planner, at, closedInputs), planner.timeline);
}

function nextEdge({ timeline, spans }: Planner, decision: Decision, at: number): number {
  let next = Math.min(timeline.slots[findSlotIndex(timeline, at)]?.to ?? timeline.freshUntil, timeline.freshUntil);
  if (decision.because.kind === 'prime') next = Math.min(next, decision.because.endsAt);
  for (const span of spans) {
    if (span.from >= next) break;
    if (span.from > at) next = span.from;
    else if (span.to > at && span.to < next) next = span.to;
  }
  return next;
}

function planned(planner: Planner, decision: Decision, closedInputs: number, from: number, to: number): PlannedRun {
  const { source, rpm, because } = decision;
  const inputs = planner.settings.inputs.slice(0, planner.traits.inputCount);
  return { from, to, source, rpm, closedInputs, activeInput: winningInput(inputs, closedInputs), because };
}

function addRun(runs: PlannedRun[], run: PlannedRun): void {
  const last = runs.at(-1);
  const same =
    last !== undefined && last.source === run.source && last.rpm === run.rpm && last.closedInputs === run.closedInputs;
  if (same) runs[runs.length - 1] = { ...last, to: run.to };
  else runs.push(run);
}
