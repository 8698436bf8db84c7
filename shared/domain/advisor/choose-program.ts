import type { ProgramEntry } from '../control/motor-settings.ts';
import { combineDays, type DayGroup } from './combine-days.ts';
import { dayFlags, listProgramEntries } from './program-entries.ts';
import { relaxVolume } from './relax-volume.ts';
import { type FoundEntries, searchLimits } from './search-entries.ts';
import type { SpeedOption } from './speed-option.ts';

/** A program with its cost a week (beside what inputs cost anyway), and whether nothing cheaper is proved to exist. */
export type ChosenProgram = {
  readonly entries: readonly ProgramEntry[];
  readonly costPerWeek: number;
  readonly proved: boolean;
};

/** Limits worth trying on the way to the motor's own: each gives the next one a program to beat. */
const stepsTo = (limit: number): number[] => [...[0, 1, 2, 4].filter((step) => step < limit), limit];

const everyLimit = (limit: number): number[] => Array.from({ length: limit + 1 }, (_, each) => each);

const lengthOf = ({ weekdays }: DayGroup): number => weekdays.length;

/** One program for every day of the week. */
function chooseForAll(
  groups: readonly DayGroup[],
  speeds: readonly SpeedOption[],
  limit: number,
): ChosenProgram | undefined {
  const found = searchLimits({ ...combineDays(groups), entryLimit: limit }, stepsTo(limit)).at(-1);
  if (found === undefined) return undefined;
  const entries = listProgramEntries(found.solution.choices, speeds, dayFlags([0, 1, 2, 3, 4, 5, 6]), true);
  return { entries, costPerWeek: found.solution.cost * 7, proved: found.proved };
}

type Share = { readonly costPerWeek: number; readonly parts: readonly FoundEntries[] };

/** Shares the motor's entries out among kinds of day at the least cost: each kind's best program for each count. */
function shareOut(groups: readonly DayGroup[], limit: number): Share | undefined {
  let shares: (Share | undefined)[] = everyLimit(limit).map(() => ({ costPerWeek: 0, parts: [] }));
  for (const group of groups) {
    const found = searchLimits({ ...group.problem, entryLimit: limit, cyclic: false }, everyLimit(limit));
    shares = everyLimit(limit).map((most) => {
      let best: Share | undefined;
      for (let own = 0; own <= most; own += 1) {
        const [one, rest] = [found[own], shares[most - own]];
        if (one === undefined || rest === undefined) continue;
        const costPerWeek = rest.costPerWeek + one.solution.cost * lengthOf(group);
        if (best === undefined || costPerWeek < best.costPerWeek) best = { costPerWeek, parts: [...rest.parts, one] };
      }
      return best;
    });
  }
  return shares[limit];
}

/** A program of its own for each kind of day. */
function chooseForEach(
  groups: readonly DayGroup[],
  speeds: readonly SpeedOption[],
  limit: number,
): ChosenProgram | undefined {
  const share = shareOut(groups, limit);
  if (share === undefined) return undefined;
  const entries = groups.flatMap(({ weekdays }, index) =>
    listProgramEntries(share.parts[index]?.solution.choices ?? [], speeds, dayFlags(weekdays), false),
  );
  return { entries, costPerWeek: share.costPerWeek, proved: share.parts.every(({ proved }) => proved) };
}

/**
 * Chooses the cheapest program of at most `limit` entries: one for every day, or one for each kind of day (weekdays and
 * weekend, say) that share the entries between them, whichever costs less. Entries for all days beside others for some
 * are not looked for. undefined where the limit is too low.
 */
export function chooseProgram(
  groups: readonly DayGroup[],
  speeds: readonly SpeedOption[],
  limit: number,
): ChosenProgram | undefined {
  const forAll = chooseForAll(groups, speeds, limit);
  if (groups.length === 1) return forAll;
  const forEach = chooseForEach(groups, speeds, limit);
  if (forAll === undefined || forEach === undefined) return forAll ?? forEach;
  return forEach.costPerWeek < forAll.costPerWeek ? forEach : forAll;
}

/** What no program of these days can cost less than, a week: the relaxation of each kind of day. undefined out of reach. */
export function leastCostPerWeek(groups: readonly DayGroup[]): number | undefined {
  let sum = 0;
  for (const group of groups) {
    const relaxed = relaxVolume({ ...group.problem, entryLimit: 0, cyclic: false });
    if (relaxed === undefined) return undefined;
    sum += relaxed.cost * lengthOf(group);
  }
  return sum;
}
