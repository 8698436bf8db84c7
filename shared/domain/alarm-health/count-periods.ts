import { HEALTH_TARGETS } from './health-targets.data.ts';

/** A flood of alarms: from the first period above the limit to the first below the lower one. `most` in one period. */
export type Flood = { readonly from: number; readonly to: number; readonly count: number; readonly most: number };

/** Alarms by 10-minute periods of the clock. `periods` counts all of the stretch, also those without an alarm. */
export type PeriodFigures = {
  readonly periods: number;
  readonly most: number;
  readonly mostAt: number | null;
  readonly above: number;
  readonly floods: readonly Flood[];
  readonly floodPeriods: number;
};

const { intervalMs, above: ABOVE } = HEALTH_TARGETS.peak;
const { beginsAbove, endsBelow } = HEALTH_TARGETS.flood;

/**
 * How instants (ms) fall into the 10-minute periods of a stretch, and the floods among them.
 *
 * @example countPeriods([0, 1, 2], 0, 3_600_000) // { periods: 6, most: 3, mostAt: 0, above: 0, floods: [], floodPeriods: 0 }
 */
export function countPeriods(instants: readonly number[], from: number, until: number): PeriodFigures {
  const first = Math.floor(from / intervalMs);
  const end = Math.ceil(until / intervalMs);
  const counts = new Map<number, number>();
  for (const at of instants) {
    if (at < from || at >= until) continue;
    const period = Math.floor(at / intervalMs);
    counts.set(period, (counts.get(period) ?? 0) + 1);
  }
  const busy = [...counts].sort(([left], [right]) => left - right);
  let [most, mostAt, above]: [number, number | null, number] = [0, null, 0];
  for (const [period, count] of busy) {
    if (count > ABOVE) above += 1;
    if (count > most) [most, mostAt] = [count, period * intervalMs];
  }
  const floods = findFloods(counts, busy, end);
  const floodPeriods = floods.reduce((sum, flood) => sum + (flood.to - flood.from) / intervalMs, 0);
  return { periods: Math.max(0, end - first), most, mostAt, above, floods, floodPeriods };
}

function findFloods(
  counts: ReadonlyMap<number, number>,
  busy: readonly (readonly [period: number, count: number])[],
  end: number,
): Flood[] {
  const floods: Flood[] = [];
  let reached = Number.NEGATIVE_INFINITY;
  for (const [start, count] of busy) {
    if (start < reached || count <= beginsAbove) continue;
    let [period, sum, most] = [start, 0, 0];
    while (period < end) {
      const here = counts.get(period) ?? 0;
      if (here < endsBelow) break;
      sum += here;
      most = Math.max(most, here);
      period += 1;
    }
    floods.push({ from: start * intervalMs, to: period * intervalMs, count: sum, most });
    reached = period;
  }
  return floods;
}
