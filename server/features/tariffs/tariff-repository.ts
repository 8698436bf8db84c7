import { and, eq, sql } from 'drizzle-orm';
import type { Context } from '#server/context.ts';
import { newId } from '#server/db/new-id.ts';
import { tariffs } from '#server/db/schema/tariffs.ts';
import type { Tariff } from '#shared/domain/energy/tariff.ts';

/** Among the advisory locks of the database: "tari" in ASCII. */
const NAMES = 0x74617269;

/** A tariff of the person's company, locked until the end of the transaction. */
export async function findTariffForUpdate(
  { db, actor }: Context,
  tariffId: string,
): Promise<{ readonly id: string; readonly name: string; readonly version: number } | undefined> {
  const [row] = await db
    .select({ id: tariffs.id, name: tariffs.name, version: tariffs.version })
    .from(tariffs)
    .where(and(eq(tariffs.companyId, actor.companyId), eq(tariffs.id, tariffId)))
    .for('update');
  return row;
}

/** Lets one person at a time name tariffs of a company, until the end of the transaction: a name is there once. */
export async function lockTariffNames({ db, actor }: Context): Promise<void> {
  await db.execute(sql`select pg_advisory_xact_lock(${NAMES}, hashtext(${actor.companyId}))`);
}

/** Adds a tariff; undefined where one of that name is there. */
export async function addTariff({ db, actor, now }: Context, tariff: Tariff): Promise<string | undefined> {
  const added = await db
    .insert(tariffs)
    .values({ id: newId(), companyId: actor.companyId, name: tariff.name, tariff, changedAt: new Date(now) })
    .onConflictDoNothing()
    .returning({ id: tariffs.id });
  return added[0]?.id;
}

/** Whether another tariff of the company bears this name. */
export async function isNameTaken({ db, actor }: Context, name: string, tariffId: string): Promise<boolean> {
  const rows = await db
    .select({ id: tariffs.id })
    .from(tariffs)
    .where(and(eq(tariffs.companyId, actor.companyId), eq(tariffs.name, name)));
  return rows.some(({ id }) => id !== tariffId);
}

export async function saveTariff({ db, actor, now }: Context, tariffId: string, tariff: Tariff, version: number) {
  await db
    .update(tariffs)
    .set({ name: tariff.name, tariff, changedAt: new Date(now), version })
    .where(and(eq(tariffs.companyId, actor.companyId), eq(tariffs.id, tariffId)));
}

export async function deleteTariff({ db, actor }: Context, tariffId: string): Promise<void> {
  await db.delete(tariffs).where(and(eq(tariffs.companyId, actor.companyId), eq(tariffs.id, tariffId)));
}
