import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { speedTolerance } from '#shared/domain/control/speed-tolerance.ts';
import { DAY_MINUTES } from '#shared/domain/time/local-time.ts';

/** A change of the program's speed: minute of the week, Monday first, and the speeds before and after, rpm. */
export type ProgramEdge = { readonly minute: number; readonly from: number; readonly to: number };

const WEEK_MINUTES = 7 * DAY_MINUTES;

/**
 * Every change of speed in a week of a motor's program; 0 rpm where nothing is due.
 *
 * @example programEdges(context)[0] // { minute: 360, from: 0, to: 1700 }
 */
export function programEdges(context: PumpContext): readonly ProgramEdge[] {
  const speeds = weekOfSpeeds(context);
  const edges: ProgramEdge[] = [];
  for (let minute = 0; minute < WEEK_MINUTES; minute += 1) {
    const from = speeds[(minute + WEEK_MINUTES - 1) % WEEK_MINUTES] ?? 0;
    const to = speeds[minute] ?? 0;
    if (Math.abs(from - to) > speedTolerance(Math.max(from, to))) edges.push({ minute, from, to });
  }
  return edges;
}

function weekOfSpeeds({ settings, traits }: PumpContext): Uint16Array {
  const speeds = new Uint16Array(WEEK_MINUTES);
  for (const { days, fromMinute, toMinute, rpm } of settings.program) {
    if (fromMinute === toMinute) continue;
    const lasts = toMinute > fromMinute ? toMinute - fromMinute : toMinute + DAY_MINUTES - fromMinute;
    days.forEach((on, weekday) => {
      if (!on) return;
      for (let minute = 0; minute < lasts; minute += 1) {
        const at = (weekday * DAY_MINUTES + fromMinute + minute) % WEEK_MINUTES;
        const before = speeds[at] ?? 0;
        if (before === 0 || (traits.programOverlap === 'higher-speed' && rpm > before)) speeds[at] = rpm;
      }
    });
  }
  return speeds;
}

/**
 * By how many minutes an observed change of speed came after the nearest one of its kind in the program, negative =
 * before; undefined where the program has none of its kind.
 *
 * @example latenessOf(edges, { minute: 375, from: 0, to: 1700 }) // 15
 */
export function latenessOf(edges: readonly ProgramEdge[], seen: ProgramEdge): number | undefined {
  let nearest: number | undefined;
  for (const edge of edges) {
    if (edge.from !== seen.from || edge.to !== seen.to) continue;
    const late = weekDifference(edge.minute, seen.minute);
    if (nearest === undefined || Math.abs(late) < Math.abs(nearest)) nearest = late;
  }
  return nearest;
}

function weekDifference(from: number, to: number): number {
  const forward = (((to - from) % WEEK_MINUTES) + WEEK_MINUTES) % WEEK_MINUTES;
  return forward > WEEK_MINUTES / 2 ? forward - WEEK_MINUTES : forward;
}
