import { clockDifference } from '#shared/domain/time/clock-time.ts';
import { weekdayOf } from '#shared/domain/time/local-time.ts';
import { cutMinutesOf, isDaylightSaving } from '../clocks/shift-cause.ts';
import { followShift, isShifted, type ShiftTrack, shiftOf, startTrack } from '../clocks/shift-track.ts';
import { defineDetector, type Finding } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL } from '../judgement.ts';

type State = { tracks: ShiftTrack[]; changes: number };
type Parameters = RuleParameters<'clock-shift'>;

/** An edge further than this from a window's usual time belongs to no window of that clock. */
const FARTHEST_MINUTES = 360;

function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { settledOn } = facts.inputs;
  if (settledOn !== 0) {
    for (let index = 0; index < facts.inputs.windows.length; index += 1) {
      if ((settledOn & (1 << index)) !== 0) takeEdge(state, facts, index, parameters);
    }
  }
  for (const track of state.tracks) if (track.shifted) return ABNORMAL;
  return NORMAL;
}

function takeEdge(state: State, facts: Facts, index: number, parameters: Parameters): void {
  const { inputs, localDay, localMinute, now } = facts;
  const minute = inputs.onMinute[index] ?? 0;
  const at = inputs.closedSince[index] ?? now;
  state.changes += 1;
  layOutTracks(state, facts, index);
  // The edge is ten minutes old: shortly after midnight it was yesterday's.
  const day = minute > localMinute + 600 ? localDay - 1 : localDay;
  const track = nearestTrack(state, index + 1, minute);
  if (track === undefined || !isDueOn(track, facts, day)) return;
  followShift(
    track,
    { at, lateMinutes: clockDifference(track.base, minute), zoneMinutes: facts.zoneOffsetMinutes },
    parameters,
  );
  if (!track.shifted) {
    const move = moveOf(track);
    const cut = move === undefined ? 0 : cutMinutesOf(move, facts.link);
    track.shifted = isShifted(track, cut > 0 ? parameters.edgesAfterCut : parameters.edges, parameters);
    if (track.shifted) track.cause = causeOf(track, cut);
  }
}

/** One track a known window; recorded windows are tracked from the record, learnt ones from when they were learnt. */
function layOutTracks(state: State, { inputs }: Facts, index: number): void {
  const windows = inputs.windows[index] ?? [];
  const input = index + 1;
  for (const window of windows) {
    const known = state.tracks.some(
      (track) =>
        track.input === input &&
        (window.recorded ? track.window === window.onMinute : followsTrack(track, window.onMinute)),
    );
    if (!known) state.tracks.push(startTrack(input, window.onMinute, window.recorded));
  }
  if (windows.length === 0 || !windows.every(({ recorded }) => recorded)) return;
  // Commissioned data changed: tracks of windows that are no more go.
  state.tracks = state.tracks.filter(
    (track) => track.input !== input || windows.some(({ onMinute }) => onMinute === track.window),
  );
}

/** A learnt window that only shows where a track has moved to is no new one. */
function followsTrack(track: ShiftTrack, onMinute: number): boolean {
  return Math.abs(clockDifference(track.base + shiftOf(track), onMinute)) <= 60;
}

function nearestTrack({ tracks }: State, input: number, minute: number): ShiftTrack | undefined {
  let nearest: ShiftTrack | undefined;
  let least = FARTHEST_MINUTES;
  for (const track of tracks) {
    const away = Math.abs(clockDifference(track.base + (track.shifted ? shiftOf(track) : 0), minute));
    const fromBase = Math.abs(clockDifference(track.base, minute));
    const distance = Math.min(away, fromBase);
    if (track.input !== input || distance > least) continue;
    nearest = track;
    least = distance;
  }
  return nearest;
}

function isDueOn(track: ShiftTrack, { inputs }: Facts, day: number): boolean {
  const window = inputs.windows[track.input - 1]?.find(
    ({ onMinute, recorded }) => recorded && onMinute === track.window,
  );
  return window === undefined || window.days[weekdayOf(day)] === true;
}

function moveOf(track: ShiftTrack) {
  if (track.badAt === 0) return undefined;
  return {
    lateMinutes: shiftOf(track),
    goodAt: track.goodAt,
    badAt: track.badAt,
    wallMinutes: track.goodAt === 0 ? 0 : track.zoneMinutes - track.goodZoneMinutes,
  };
}

/** Known causes first; then a slow walk is drift, and a step is trippers that somebody moved. */
function causeOf(track: ShiftTrack, cut: number): string {
  const move = moveOf(track);
  if (move !== undefined && isDaylightSaving(move)) return 'daylight-saving';
  if (cut > 0) return 'power-cut';
  return track.walks ? 'drift' : 'trippers-moved';
}

function describe({ tracks }: State, facts: Facts): Finding {
  const shifted = tracks.filter((track) => track.shifted);
  const worst = shifted.reduce(
    (most, track) => (Math.abs(shiftOf(track)) > Math.abs(shiftOf(most)) ? track : most),
    shifted[0] ?? startTrack(0, 0, true),
  );
  const late = shiftOf(worst);
  return {
    cause: worst.cause,
    from: worst.badAt,
    priority: shifted.some(({ input }) => isDear(input, facts)) ? 'soon' : 'note',
    evidence: {
      input: worst.input,
      inputs: [...new Set(shifted.map(({ input }) => input))],
      minutes: Math.round(Math.abs(late)),
      direction: late > 0 ? 'slow' : 'fast',
      usualMinute: Math.round(worst.base),
      edgesOff: worst.late.length,
    },
  };
}

/** A heater fed by the clock, or a booster that must run only while the pump does. */
function isDear(input: number, { context }: Facts): boolean {
  const heats = context.inputs.some(({ number, drives }) => number === input && drives === 'heater');
  return (
    heats ||
    context.equipment.some(({ kind, input: fed }) => fed === input && (kind === 'heater' || kind === 'booster'))
  );
}

export const clockShift = defineDetector<'clock-shift', State>({
  detector: 'clock-shift',
  hears: ['reading'],
  learntVersion: ({ changes }) => changes,
  initial: () => ({ tracks: [], changes: 0 }),
  judge,
  delaySeconds: () => 0,
  describe,
});
