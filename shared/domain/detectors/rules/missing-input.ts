import type { InputDuty } from '#shared/domain/control/pump-context.ts';
import { zoneOffsetAt } from '#shared/domain/time/zone-offset.ts';
import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import type { KnownWindow } from '../inputs/known-window.ts';
import { nextOpening } from '../inputs/window-times.ts';
import { ABNORMAL, type Judgement, NORMAL } from '../judgement.ts';
import { outageMs } from '../link/outage-time.ts';

/** One known window: when it is next due, when it was due before that, and how often in a row it stayed away. */
type Due = {
  input: number;
  onMinute: number;
  dueAt: number;
  checkAt: number;
  beforeAt: number;
  misses: number;
  missedAt: number;
};
type State = { dues: Due[]; nextCheckAt: number; missing: number; all: boolean; changes: number };
type Parameters = RuleParameters<'missing-input'>;

const MINUTE_MS = 60_000;
const WEEK_MS = 7 * 86_400_000;
/** Duties whose input is missed at once. */
const MATTERS: ReadonlySet<InputDuty> = new Set(['heater', 'cleaner']);
/** More of the time than this not seen, and nothing is known of the window. */
const UNSEEN_SHARE = 0.25;
/** A closing within this of an opening is that opening's. */
const SAME_OPENING_MS = 3_600_000;

function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { inputs, now } = facts;
  if (inputs.windowsChanged) layOut(state, facts, parameters);
  if (state.nextCheckAt !== 0 && now >= state.nextCheckAt) checkDues(state, facts, parameters);
  if (state.missing !== 0) forgiveClosed(state, inputs.closedSince);
  return state.missing === 0 ? NORMAL : ABNORMAL;
}

const isSame = (due: Due, window: KnownWindow): boolean =>
  due.input === window.input && Math.abs(due.onMinute - window.onMinute) < 30;

/** Follows the known windows as they are recorded or learnt; what is known of one that stays is kept. */
function layOut(state: State, facts: Facts, parameters: Parameters): void {
  const known = state.dues;
  const windows = facts.inputs.windows.flat();
  state.dues = windows.flatMap((window) => {
    const kept = known.find((due) => isSame(due, window));
    if (kept !== undefined)
      return isSooner(kept, window, facts) && !setNext(kept, window, facts, parameters) ? [] : [kept];
    const due = {
      input: window.input,
      onMinute: window.onMinute,
      dueAt: 0,
      checkAt: 0,
      beforeAt: 0,
      misses: 0,
      missedAt: 0,
    };
    return setNext(due, window, facts, parameters) ? [due] : [];
  });
  noteNextCheck(state);
}

/** A window learnt for more days is due sooner than was thought. */
function isSooner(due: Due, window: KnownWindow, { context, localDay, now }: Facts): boolean {
  const opens = nextOpening(window, context.zone, localDay, now);
  return opens !== undefined && opens < due.dueAt - SAME_OPENING_MS;
}

/** Sets the next due opening; the check waits an hour, and longer where the dial is known to be behind. */
function setNext(due: Due, window: KnownWindow, facts: Facts, { lateMinutes, graceMinutes }: Parameters): boolean {
  const { context, localDay, now } = facts;
  const opens = nextOpening(window, context.zone, localDay, now);
  if (opens === undefined) return false;
  due.beforeAt = due.dueAt === 0 || due.dueAt > opens ? now : due.dueAt;
  due.dueAt = opens;
  due.onMinute = window.onMinute;
  due.checkAt = opens + (lateMinutes + graceMinutes) * MINUTE_MS + Math.max(0, springMs(context.zone, opens));
  return true;
}

/** A dial knows no daylight saving: in the week after the clocks went forward it is an hour behind. */
function springMs(zone: string, at: number): number {
  return ((zoneOffsetAt(zone, at) ?? 0) - (zoneOffsetAt(zone, at - WEEK_MS) ?? 0)) * MINUTE_MS;
}

function noteNextCheck(state: State): void {
  let next = Number.MAX_SAFE_INTEGER;
  for (const { checkAt } of state.dues) next = Math.min(next, checkAt);
  if (state.dues.length === 0) next = 0;
  if (next !== state.nextCheckAt) state.changes += 1;
  state.nextCheckAt = next;
}

function checkDues(state: State, facts: Facts, parameters: Parameters): void {
  const windows = facts.inputs.windows.flat();
  for (const due of state.dues) {
    if (facts.now < due.checkAt) continue;
    // A dial that stood still in a cut is behind by as much: it gets that time on top.
    const behind = outageMs(facts.link.outages, due.beforeAt, due.checkAt);
    if (behind > 0 && facts.now < due.checkAt + behind && hasNotCome(state, due, facts)) {
      due.checkAt += behind;
      continue;
    }
    checkDue(state, due, facts, parameters);
    const window = windows.find((candidate) => isSame(due, candidate));
    if (window === undefined || !setNext(due, window, facts, parameters)) due.checkAt = Number.MAX_SAFE_INTEGER;
  }
  noteNextCheck(state);
}

function checkDue(state: State, due: Due, facts: Facts, parameters: Parameters): void {
  const { link } = facts;
  const bit = 1 << (due.input - 1);
  if (!hasNotCome(state, due, facts)) {
    due.misses = 0;
    due.missedAt = 0;
    return;
  }
  const watchedMs = due.checkAt - due.dueAt;
  if (outageMs(link.outages, due.dueAt, due.checkAt) > UNSEEN_SHARE * watchedMs) return;
  due.misses += 1;
  if (due.missedAt === 0) due.missedAt = due.dueAt;
  const needed = isMissedAtOnce(due.input, facts) ? parameters.dueDaysThatMatter : parameters.dueDays;
  if (due.misses >= needed) state.missing |= bit;
}

/**
 * Neither closed now nor since it was due; nor at another hour since the opening before it: a shifted dial is no
 * missing input.
 */
function hasNotCome(state: State, due: Due, { inputs }: Facts): boolean {
  const index = due.input - 1;
  if ((inputs.closedSince[index] ?? 0) !== 0 || (inputs.lastOffAt[index] ?? 0) >= due.dueAt) return false;
  return (inputs.lastOnAt[index] ?? 0) <= openingBefore(state, due) + SAME_OPENING_MS;
}

/** When this input was last due before a due opening, by any of its windows. */
function openingBefore({ dues }: State, { input, dueAt, beforeAt }: Due): number {
  let latest = beforeAt;
  for (const other of dues) {
    if (other.input !== input) continue;
    for (const at of [other.dueAt, other.beforeAt]) if (at < dueAt && at > latest) latest = at;
  }
  return latest;
}

function isMissedAtOnce(input: number, { context }: Facts): boolean {
  const drives = context.inputs.find(({ number }) => number === input)?.drives;
  const heats = context.equipment.some(({ kind, input: fed }) => kind === 'heater' && fed === input);
  return heats || (drives !== undefined && MATTERS.has(drives));
}

function forgiveClosed(state: State, closedSince: readonly number[]): void {
  for (const due of state.dues) {
    if ((closedSince[due.input - 1] ?? 0) === 0 || due.misses === 0) continue;
    state.changes += 1;
    state.missing &= ~(1 << (due.input - 1));
    due.misses = 0;
    due.missedAt = 0;
  }
}

function describe(state: State, facts: Facts, _: Parameters, { raised }: Spoken): Finding {
  const missed = state.dues.filter(({ misses }) => misses > 0);
  const worst = missed.find(({ input }) => (state.missing & (1 << (input - 1))) !== 0) ?? missed[0];
  const inputs = new Set(state.dues.map(({ input }) => input));
  const missedInputs = new Set(missed.map(({ input }) => input));
  // One that comes back before the other does not change what kept both away.
  state.all = (raised && state.all) || (inputs.size > 1 && missedInputs.size === inputs.size);
  return {
    cause: state.all ? 'all-inputs' : 'one-input',
    ...(worst === undefined ? {} : { from: Math.min(...missed.map(({ missedAt }) => missedAt)) }),
    evidence: {
      input: worst?.input ?? null,
      inputs: [...missedInputs],
      dueDaysMissed: worst?.misses ?? 0,
      dueAtMinute: worst === undefined ? null : Math.round(worst.onMinute),
      drives: facts.context.inputs.find(({ number }) => number === worst?.input)?.drives ?? null,
    },
  };
}

export const missingInput = defineDetector<'missing-input', State>({
  detector: 'missing-input',
  hears: ['reading'],
  learntVersion: ({ changes }) => changes,
  initial: () => ({ dues: [], nextCheckAt: 0, missing: 0, all: false, changes: 0 }),
  judge,
  delaySeconds: () => 0,
  describe,
});
