import { and, eq, inArray, sql } from 'drizzle-orm';
import type { BacktestRequest } from '#server/backtest/stored/backtest-request.ts';
import type { Context } from '#server/context.ts';
import { newId } from '#server/db/new-id.ts';
import { backtests } from '#server/db/schema/backtests.ts';

/** Puts a backtest in line and rings for the worker; undefined where the company has one underway: one at a time. */
export async function addBacktest({ db, actor, now }: Context, request: BacktestRequest): Promise<string | undefined> {
  const underway = await db.$count(
    backtests,
    and(eq(backtests.companyId, actor.companyId), inArray(backtests.state, ['waiting', 'running'])),
  );
  if (underway > 0) return undefined;
  const added = await db
    .insert(backtests)
    .values({
      ...{ id: newId(now), companyId: actor.companyId, askedBy: actor.userId, askedAt: new Date(now) },
      ...{ state: 'waiting' as const, request, pumpCount: request.pumpIds.length },
    })
    .onConflictDoNothing()
    .returning({ id: backtests.id });
  if (added.length > 0) await db.execute(sql`select pg_notify('millrace_backtest', '')`);
  return added[0]?.id;
}

/** Calls a backtest off: one that waits ends at once, one that runs in a moment. What has ended stays. */
export async function callOff({ db, actor, now }: Context, backtestId: string): Promise<void> {
  const at = new Date(now);
  const own = and(eq(backtests.companyId, actor.companyId), eq(backtests.id, backtestId));
  await db
    .update(backtests)
    .set({ state: 'cancelled', cancelAskedAt: at, endedAt: at })
    .where(and(own, eq(backtests.state, 'waiting')));
  await db
    .update(backtests)
    .set({ cancelAskedAt: at })
    .where(and(own, eq(backtests.state, 'running')));
}
