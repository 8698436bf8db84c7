import { DAY_MINUTES } from '#shared/domain/time/local-time.ts';

/**
 * The on-edges of one window against their usual time of day. `window` is the recorded or first learnt minute, `base`
 * the usual one with its fraction; `late` the last edges' minutes after it (negative: early), newest last; `goodAt`
 * the last edge in time and `badAt` the first that was not, ms, 0 = none.
 */
export type ShiftTrack = {
  input: number;
  window: number;
  base: number;
  taught: number;
  late: number[];
  goodAt: number;
  goodZoneMinutes: number;
  badAt: number;
  zoneMinutes: number;
  walks: boolean;
  shifted: boolean;
  cause: string;
  shiftedEdges: number;
};

export type ShiftEdge = { readonly at: number; readonly lateMinutes: number; readonly zoneMinutes: number };
export type ShiftLimits = { readonly shiftMinutes: number; readonly deadbandMinutes: number };

const KEPT_EDGES = 6;
/** The usual time is the mean of the first edges, and then stands. */
const TEACHING_EDGES = 7;
/** Edges of one shift lie together; those of a drift follow each other in small steps, minutes. */
const TOGETHER_MINUTES = 20;
const STEP_MINUTES = 10;
/** So many edges in time end a shift. */
const EDGES_BACK = 2;
/** A shift nobody recorded becomes the usual time after so many edges. */
const NEW_USUAL_EDGES = 14;

export function startTrack(input: number, onMinute: number, recorded: boolean): ShiftTrack {
  return {
    input,
    window: onMinute,
    base: onMinute,
    taught: recorded ? 1 : 4,
    late: [],
    goodAt: 0,
    goodZoneMinutes: 0,
    badAt: 0,
    zoneMinutes: 0,
    walks: false,
    shifted: false,
    cause: 'unknown',
    shiftedEdges: recorded ? -1 : 0,
  };
}

/** Takes one edge in, and ends a shift that is over. */
export function followShift(track: ShiftTrack, edge: ShiftEdge, limits: ShiftLimits): void {
  const before = track.late.at(-1);
  track.late = [...track.late, Math.round(edge.lateMinutes * 10) / 10].slice(-KEPT_EDGES);
  track.zoneMinutes = edge.zoneMinutes;
  if (Math.abs(edge.lateMinutes) <= limits.shiftMinutes) {
    teach(track, edge);
  } else {
    if (track.badAt === 0) {
      track.badAt = edge.at;
      // It walked over the limit rather than stepped.
      track.walks = before !== undefined && Math.abs(edge.lateMinutes - before) <= STEP_MINUTES;
    }
    if (track.shifted && track.shiftedEdges >= 0) track.shiftedEdges += 1;
    if (track.shiftedEdges >= NEW_USUAL_EDGES) becomeUsual(track);
  }
  const back = track.late.slice(-EDGES_BACK);
  const isBack =
    back.length === EDGES_BACK && back.every((late) => Math.abs(late) <= limits.shiftMinutes - limits.deadbandMinutes);
  if (track.shifted && isBack) endShift(track);
  if (!track.shifted && Math.abs(edge.lateMinutes) <= limits.shiftMinutes) track.badAt = 0;
}

function teach(track: ShiftTrack, edge: ShiftEdge): void {
  track.goodAt = edge.at;
  track.goodZoneMinutes = edge.zoneMinutes;
  if (track.taught >= TEACHING_EDGES) return;
  track.taught += 1;
  track.base = (track.base + edge.lateMinutes / track.taught + DAY_MINUTES) % DAY_MINUTES;
}

function endShift(track: ShiftTrack): void {
  track.shifted = false;
  track.badAt = 0;
  track.walks = false;
  if (track.shiftedEdges > 0) track.shiftedEdges = 0;
}

function becomeUsual(track: ShiftTrack): void {
  track.base = (track.base + shiftOf(track) + DAY_MINUTES) % DAY_MINUTES;
  track.window = track.base;
  track.late = [];
  endShift(track);
}

/** Whether the last `edges` edges all lie off on one side, together or in small steps. */
export function isShifted(track: ShiftTrack, edges: number, { shiftMinutes }: ShiftLimits): boolean {
  const last = track.late.slice(-edges);
  const side = Math.sign(last[0] ?? 0);
  if (last.length < edges || !last.every((late) => Math.sign(late) === side && Math.abs(late) > shiftMinutes))
    return false;
  const spread = Math.max(...last) - Math.min(...last);
  const steps = last.every((late, index) => index === 0 || Math.abs(late - (last[index - 1] ?? late)) <= STEP_MINUTES);
  return spread <= TOGETHER_MINUTES || steps;
}

/** How late the clock is now, minutes: the middle of the last edges off their time; 0 while none is. */
export function shiftOf(track: ShiftTrack): number {
  if (track.badAt === 0) return 0;
  const last = track.late.slice(-3).toSorted((left, right) => left - right);
  return last[Math.floor(last.length / 2)] ?? 0;
}
