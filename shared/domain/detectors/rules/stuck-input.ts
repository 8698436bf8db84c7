import { clockDifference } from '#shared/domain/time/clock-time.ts';
import { DAY_MINUTES, MINUTE_MS } from '#shared/domain/time/local-time.ts';
import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { perInput } from '../inputs/input-facts.ts';
import { type KnownWindow, windowMinutes } from '../inputs/known-window.ts';
import { nextClosing, nextOpening } from '../inputs/window-times.ts';
import { ABNORMAL, type Judgement, NORMAL } from '../judgement.ts';

/**
 * Of the input that is closed longest past its off time: its number and when it should have opened. `since`, `offDue`
 * and `waits` (minutes to wait after it) list that for every input, `onTimeAt` when each last closed on time; `tripper`
 * marks the inputs that ran through one off time and opened at another.
 */
type State = {
  since: number[];
  offDue: number[];
  waits: number[];
  onTimeAt: number[];
  input: number;
  offAt: number;
  cause: string;
  tripper: number;
};
type Parameters = RuleParameters<'stuck-input'>;

/** An edge further from a tripper than this was made by hand, unless the dial is off. */
const BY_HAND_MINUTES = 45;
/** A dial that is off moves its whole window; further than this it is another window. */
const FARTHEST_SHIFT_MINUTES = 360;
const AT_TRIPPER_MINUTES = 20;
const RIGHT_TODAY_MS = 20 * 3_600_000;

function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { inputs, now } = facts;
  let worst = 0;
  let worstPast = 0;
  for (let index = 0; index < inputs.closedSince.length; index += 1) {
    const since = inputs.closedSince[index] ?? 0;
    if (since !== (state.since[index] ?? 0)) follow(state, facts, index, since, parameters);
    const offDue = state.offDue[index] ?? 0;
    if (since === 0 || offDue === 0) continue;
    const past = now - offDue - (state.waits[index] ?? 0) * MINUTE_MS;
    if (past < 0 || (worst !== 0 && past <= worstPast)) continue;
    worst = index + 1;
    worstPast = past;
  }
  if (worst === 0) return NORMAL;
  if (state.input !== worst || !facts.stands('stuck-input')) state.cause = causeOf(facts, worst, state);
  state.input = worst;
  state.offAt = state.offDue[worst - 1] ?? now;
  // A lever goes back at the next tripper, and a contact whose tripper is missing opens at the one after it.
  if (hasPassedTripper(state, facts, worst, parameters)) state.cause = 'switch-welded';
  return ABNORMAL;
}

/** An input closed or opened: when it should open again, or what its opening tells. */
function follow(state: State, facts: Facts, index: number, since: number, parameters: Parameters): void {
  state.since[index] = since;
  state.waits[index] = parameters.noteAfterMinutes;
  if (since === 0) {
    if (state.input === index + 1) learnFromOpening(state, facts, index);
    state.offDue[index] = 0;
    return;
  }
  const byHand = isByHand(state, facts, index, since, parameters);
  if (!byHand && isOnTime(facts, index)) state.onTimeAt[index] = since;
  state.offDue[index] = byHand ? since : offDueAt(facts, index, since);
  if (byHand) state.waits[index] = parameters.byHandMinutes;
}

/**
 * Closed at an hour of no window, by a dial that was right today or cannot be off by that much, and no window opens
 * soon.
 */
function isByHand(state: State, facts: Facts, index: number, since: number, { byHandMinutes }: Parameters): boolean {
  const { inputs, context, localDay } = facts;
  const windows = inputs.windows[index] ?? [];
  const minute = inputs.onMinute[index] ?? 0;
  const opened = nearestWindow(windows, minute);
  if (inputs.edgeSeen[index] !== true || opened === undefined || windows.some((window) => holds(window, minute)))
    return false;
  const rightToday = since - (state.onTimeAt[index] ?? 0) < RIGHT_TODAY_MS;
  if (!rightToday && Math.abs(opened.missedBy) <= FARTHEST_SHIFT_MINUTES) return false;
  return windows.every((window) => {
    const opens = nextOpening(window, context.zone, localDay, since);
    return opens === undefined || opens - since > byHandMinutes * MINUTE_MS;
  });
}

function isOnTime({ inputs }: Facts, index: number): boolean {
  const opened = nearestWindow(inputs.windows[index] ?? [], inputs.onMinute[index] ?? 0);
  return opened !== undefined && Math.abs(opened.missedBy) <= BY_HAND_MINUTES;
}

function holds(window: KnownWindow, minute: number): boolean {
  return (minute - window.onMinute + DAY_MINUTES) % DAY_MINUTES < windowMinutes(window);
}

/**
 * In its window an input opens at the off tripper, or a whole window after a late edge: a dial that is behind shifts
 * both. Outside of it, a dial that is off closes it for as long as the window lasts; else the next off tripper opens it.
 */
function offDueAt(facts: Facts, index: number, since: number): number {
  const { context, inputs, localDay } = facts;
  const windows = inputs.windows[index] ?? [];
  const minute = inputs.onMinute[index] ?? 0;
  let next = 0;
  for (const window of windows) {
    const closes = nextClosing(window, context.zone, localDay, since);
    if (closes !== undefined && (next === 0 || closes < next)) next = closes;
  }
  const opened = nearestWindow(windows, minute);
  if (next === 0 || opened === undefined || Math.abs(opened.missedBy) > FARTHEST_SHIFT_MINUTES) return next;
  const whole = since + windowMinutes(opened.window) * MINUTE_MS;
  const early = opened.missedBy < 0 && next - since <= (windowMinutes(opened.window) - opened.missedBy) * MINUTE_MS;
  return early || windows.some((window) => holds(window, minute)) ? Math.max(next, whole) : whole;
}

function nearestWindow(
  windows: readonly KnownWindow[],
  minute: number,
): { readonly window: KnownWindow; readonly missedBy: number } | undefined {
  let nearest: { readonly window: KnownWindow; readonly missedBy: number } | undefined;
  for (const window of windows) {
    const missedBy = clockDifference(window.onMinute, minute);
    if (nearest === undefined || Math.abs(missedBy) < Math.abs(nearest.missedBy)) nearest = { window, missedBy };
  }
  return nearest;
}

/**
 * A contact that switches a few milliamperes does not weld; trippers are held by a screw and come off (common practice).
 * So one that a dial closed and did not open has lost its off tripper, until a second tripper proves otherwise.
 */
function causeOf(facts: Facts, input: number, { tripper }: State): string {
  if ((tripper & (1 << (input - 1))) !== 0) return 'tripper-missing';
  const { inputs } = facts;
  const opened = nearestWindow(inputs.windows[input - 1] ?? [], inputs.onMinute[input - 1] ?? 0);
  const byHand = inputs.edgeSeen[input - 1] === true && Math.abs(opened?.missedBy ?? 0) > BY_HAND_MINUTES;
  if (facts.stands('clock-shift')) return 'unknown';
  if (byHand) return 'lever-left-on';
  const record = facts.context.inputs.find(({ number }) => number === input);
  return inputs.edgeSeen[input - 1] === true && record?.clockType !== 'electronic' ? 'tripper-missing' : 'unknown';
}

/**
 * It stayed closed past an off tripper that is known to be there: the second of two different ones; or, put on by
 * hand, a whole day in which the dial went round. The trippers are there and the contact does not open.
 */
function hasPassedTripper(state: State, facts: Facts, input: number, { alarmAfterMinutes }: Parameters): boolean {
  const { inputs, context, localDay, now } = facts;
  if (state.cause === 'lever-left-on') return now - state.offAt >= alarmAfterMinutes * MINUTE_MS;
  const since = inputs.closedSince[input - 1] ?? 0;
  const windows = inputs.windows[input - 1] ?? [];
  const known = (state.tripper & (1 << (input - 1))) !== 0 || state.cause === 'switch-welded';
  if (known || windows.length < 2) return false;
  const passed = windows.filter((window) => {
    const closes = nextClosing(window, context.zone, localDay - 1, since);
    return closes !== undefined && now > closes + AT_TRIPPER_MINUTES * MINUTE_MS;
  });
  return passed.length >= 2;
}

/** It opened at another window's off tripper: the one it ran through is missing. */
function learnFromOpening(state: State, { inputs, localMinute }: Facts, index: number): void {
  const windows = inputs.windows[index] ?? [];
  const atTripper = windows.some(
    ({ offMinute }) => Math.abs(clockDifference(offMinute, localMinute)) <= AT_TRIPPER_MINUTES,
  );
  if (windows.length < 2 || !atTripper) return;
  state.tripper |= 1 << index;
  state.cause = 'tripper-missing';
}

function describe(state: State, { now, inputs }: Facts, parameters: Parameters, { raised, from }: Spoken): Finding {
  const pastMinutes = (now - (raised ? from : state.offAt)) / MINUTE_MS;
  const closed = (inputs.closedSince[state.input - 1] ?? 0) !== 0;
  const alarm = pastMinutes >= parameters.alarmAfterMinutes && closed;
  return {
    cause: state.cause,
    from: state.offAt,
    alarmClass: alarm ? 'alarm' : 'note',
    priority: alarm ? 'soon' : 'note',
    evidence: { input: state.input, minutes: Math.round(pastMinutes) },
  };
}

export const stuckInput = defineDetector<'stuck-input', State>({
  detector: 'stuck-input',
  hears: ['reading'],
  looksAgainOnReturn: true,
  initial: () => ({
    since: perInput(() => 0),
    offDue: perInput(() => 0),
    waits: perInput(() => 0),
    onTimeAt: perInput(() => 0),
    input: 0,
    offAt: 0,
    cause: 'unknown',
    tripper: 0,
  }),
  judge,
  delaySeconds: () => 0,
  describe,
});
