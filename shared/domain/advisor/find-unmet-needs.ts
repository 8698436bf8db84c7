import type { Micros } from '../energy/money.ts';
import { DAY_MINUTES } from '../time/local-time.ts';
import type { GridSlot } from './day-grid.ts';
import { type DayTerms, inputWater } from './day-problem.ts';
import type { EntryProblem } from './entry-problem.ts';
import { GRID_MINUTES, type PadNeeds, type UnmetNeed, type UnmetReason } from './pad-needs.ts';
import { marginOf } from './speed-limits.ts';
import { visitMinutes, type WeekMinutes } from './week-minutes.ts';

/** A weekday's grid and problem beside each other. */
export type DayCase = {
  readonly weekday: number;
  readonly grid: readonly GridSlot[];
  /** Price of a kWh by hour, micros. */
  readonly prices: readonly Micros[];
  readonly problem: Omit<EntryProblem, 'entryLimit' | 'cyclic'>;
};

type Finding = Omit<UnmetNeed, 'weekdays'> & { readonly weekday: number };

/** One row for each need and reason, its weekdays together, the largest want and the least reach of them. */
function gather(findings: readonly Finding[]): UnmetNeed[] {
  const rows = new Map<string, { row: UnmetNeed; weekdays: Set<number> }>();
  for (const { weekday, ...finding } of findings) {
    const key = `${finding.need} ${finding.reason}`;
    const known = rows.get(key);
    const weekdays = known?.weekdays ?? new Set<number>();
    weekdays.add(weekday);
    const wanted = Math.max(finding.wanted, known?.row.wanted ?? finding.wanted);
    const reachable = Math.min(finding.reachable, known?.row.reachable ?? finding.reachable);
    rows.set(key, { weekdays, row: { ...finding, weekdays: [], wanted, reachable } });
  }
  return [...rows.values()].map(({ row, weekdays }) => ({ ...row, weekdays: [...weekdays].sort((a, b) => a - b) }));
}

/** Quarter-hours that no speed can serve: beyond the motor's top speed, or faster than the quiet hours allow. */
function findHardSlots(terms: DayTerms, { weekday, grid, problem }: DayCase): Finding[] {
  const topRpm = terms.speeds.at(-1)?.rpm ?? 0;
  return grid.flatMap((slot, index): Finding[] => {
    if (problem.slots[index]?.cost.some(Number.isFinite) === true) return [];
    const reason: UnmetReason = Number.isFinite(slot.leastRpm) ? 'against-quiet-hours' : 'beyond-top-speed';
    const reachable = reason === 'beyond-top-speed' ? topRpm : slot.mostRpm;
    return [{ need: slot.askedBy ?? 'daily-volume', reason, weekday, wanted: slot.leastRpm, reachable }];
  });
}

/** Windows in which a closed input holds the motor slower than the need asks. */
function findSlowInputs(terms: DayTerms, needs: PadNeeds, inputs: WeekMinutes): Finding[] {
  const findings: Finding[] = [];
  for (const need of needs.windows) {
    const { kind, minimumRpm = 0, minimumGpm = 0 } = need;
    const slow = new Map<number, number>();
    visitMinutes(need, marginOf(need), (minute) => {
      const rpm = inputs[minute] ?? 0;
      const option = rpm > 0 ? terms.speedAt(rpm) : undefined;
      if (option === undefined || (option.rpm >= minimumRpm && option.gpm >= minimumGpm)) return;
      slow.set(Math.floor(minute / DAY_MINUTES), rpm);
    });
    for (const [weekday, rpm] of slow)
      findings.push({
        need: kind,
        reason: 'input-too-slow',
        weekday,
        wanted: Math.max(minimumRpm, rpm),
        reachable: rpm,
      });
  }
  return findings;
}

const mostOf = (choices: readonly number[], cost: readonly number[]): number =>
  Math.max(0, ...choices.filter((_, choice) => Number.isFinite(cost[choice] ?? Number.NaN)));

/** Sums that stay short even with every quarter-hour at its best. */
function findShortSums(terms: DayTerms, { weekday, problem }: DayCase, inputs: WeekMinutes): Finding[] {
  const given = inputWater(terms, weekday, inputs);
  const gallons = problem.slots.reduce((sum, slot) => sum + mostOf(slot.gallons, slot.cost), 0);
  const counts = problem.slots.reduce((sum, slot) => sum + mostOf(slot.counts, slot.cost), 0);
  const findings: Finding[] = [];
  if (gallons < problem.wantedGallons - 1e-6)
    findings.push({
      need: 'daily-volume',
      reason: 'more-than-it-can-move',
      weekday,
      wanted: terms.gallonsPerDay,
      reachable: gallons + given.gallons,
    });
  if (counts < problem.wantedCount)
    findings.push({
      need: 'flow-hours',
      reason: 'more-than-it-can-move',
      weekday,
      wanted: terms.hours?.hours ?? 0,
      reachable: (counts * GRID_MINUTES + given.minutes) / 60,
    });
  return findings;
}

/**
 * Names every need that no program of any length can meet, before one is searched: windows beyond the motor or against
 * the quiet hours, inputs that hold it too slow, water or hours out of reach.
 *
 * @example findUnmetNeeds(terms, needs, days, inputs)
 * // [{ need: 'heater', reason: 'against-quiet-hours', weekdays: [5, 6], wanted: 2400, reachable: 1800 }]
 */
export function findUnmetNeeds(
  terms: DayTerms,
  needs: PadNeeds,
  days: readonly DayCase[],
  inputs: WeekMinutes,
): UnmetNeed[] {
  return gather([
    ...days.flatMap((day) => findHardSlots(terms, day)),
    ...findSlowInputs(terms, needs, inputs),
    ...days.flatMap((day) => findShortSums(terms, day, inputs)),
  ]);
}
