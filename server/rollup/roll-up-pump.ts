import type pg from 'pg';
import { monthStart } from '#server/db/day-text.ts';
import { type Mark, markPump } from '#server/db/rollup-marks.ts';
import { asMachine, type Transaction } from '#server/db/transaction.ts';
import { rollUpDay } from '#shared/domain/rollup/roll-up-day.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import { type LocalDay, localDays } from '#shared/domain/time/local-days.ts';
import { DAY_MS, HOUR_MS } from '#shared/domain/time/local-time.ts';
import { addToCompanyDay } from './company-sums.ts';
import { findFirstRun, listReadingsOver, listRunsOver } from './day-sources.ts';
import { listMonthsOver } from './month-repository.ts';
import { priceMonths } from './price-months.ts';
import { moveCursor, type TakenPump, takeMarks, takePump } from './rollup-work.ts';
import { writeDay } from './write-day.ts';

/** Days of one pump in one transaction: a backlog is worked off in small bites. */
const MOST_DAYS = 12;
/** A run is only settled this long after it: a speed that leaves its mean makes a run a minute later. */
const SETTLED_MS = HOUR_MS / 2;

export type RollupOptions = {
  readonly pool: pg.Pool;
  readonly now: () => number;
  /** Raw readings are kept this many days: what is older stays as it was rolled up. */
  readonly rawDays: number;
};

/**
 * Rolls up what a pump's fold has understood since the last time, and what was marked: each local day that it touches is
 * worked out from its readings and runs and put in the place of what was there, its month priced anew, and the cursor moved,
 * all in one transaction. Says whether there is more to do at once.
 */
export function rollUpPump(options: RollupOptions, pumpId: string): Promise<boolean> {
  return asMachine(options.pool, async (db, client) => {
    const pump = await takePump(client, pumpId);
    if (pump === undefined) return false;
    const marks = await takeMarks(client, pump);
    const days = await listTouchedDays(client, pump, marks, options);
    const now = days.slice(0, MOST_DAYS);
    for (const day of now) await rollUp(client, pump, day);
    const left = days.slice(MOST_DAYS);
    await postpone(db, pump, left);
    await moveCursor(client, pumpId, pump.highWater);
    const months = new Set(now.map(({ epochDay }) => monthStart(epochDay)));
    for (const mark of marks) {
      if (mark.kind === 'prices') for (const month of await listMonthsOver(db, pump, mark)) months.add(month);
    }
    await priceMonths(db, pump, [...months], options.now());
    return left.length > 0;
  });
}

/** Every local day that is to be worked out, in order, none older than the raw readings. */
async function listTouchedDays(
  client: pg.PoolClient,
  pump: TakenPump,
  marks: readonly Mark[],
  { now, rawDays }: RollupOptions,
): Promise<LocalDay[]> {
  const { zone, highWater } = pump;
  const fresh = await findFreshStart(client, pump);
  const days = new Map<number, LocalDay>();
  const add = (from: number, to: number): void => {
    for (const day of localDays(zone, from, to)) days.set(day.epochDay, day);
  };
  if (fresh !== undefined && fresh <= highWater) add(fresh, highWater + 1);
  for (const mark of marks) if (mark.kind === 'days') add(mark.from, Math.min(mark.to, highWater + 1));
  const oldest = now() - (rawDays - 1) * DAY_MS;
  return [...days.values()].filter(({ from }) => from >= oldest).sort((left, right) => left.epochDay - right.epochDay);
}

/**
 * From where on the stored days may say something else now. A run that has ended since is spread over all its days; of one
 * that is still open only the day on which we last looked, and those after it, are worked out again.
 */
async function findFreshStart(client: pg.PoolClient, pump: TakenPump): Promise<number | undefined> {
  const { pumpId, rolledTo, highWater } = pump;
  if (rolledTo === null) return findFirstRun(client, pumpId);
  if (highWater <= rolledTo) return undefined;
  const runs = await listRunsOver(client, pumpId, { from: rolledTo - SETTLED_MS, to: highWater + 1 });
  const ended = runs.filter(({ to }) => to !== undefined).map(({ from }) => from);
  return Math.min(rolledTo, ...ended);
}

/** What does not fit into this bite is marked for the next one. */
async function postpone(db: Transaction, { pumpId }: TakenPump, left: readonly LocalDay[]): Promise<void> {
  const [first, last] = [left[0], left.at(-1)];
  if (first === undefined || last === undefined) return;
  await markPump(db, pumpId, { kind: 'days', from: first.from, to: last.to });
}

async function rollUp(client: pg.PoolClient, pump: TakenPump, day: LocalDay): Promise<void> {
  const runs = await listRunsOver(client, pump.pumpId, day);
  const readings = await listReadingsOver(client, pump, day);
  const rollup = rollUpDay(pump.zone, day, readings, withLastRun(runs), pump.highWater);
  await addToCompanyDay(client, pump, rollup);
  await writeDay(client, pump, rollup, day.to <= pump.highWater);
}

/** Only the newest run may be open; an older one that was left open ends where the next begins. */
const withLastRun = (runs: readonly Run[]): Run[] =>
  runs.map((run, index) => (run.to === undefined ? { ...run, to: runs[index + 1]?.from } : run));
