import { eq, sql } from 'drizzle-orm';
import type { Context } from '#server/context.ts';
import { carbonChoices } from '#server/db/schema/carbon-choices.ts';

/** The grid a company chose; undefined where nothing was said yet. */
export async function findCarbonChoice({ db, actor }: Context) {
  const [row] = await db.select().from(carbonChoices).where(eq(carbonChoices.companyId, actor.companyId));
  return row;
}

export async function saveCarbonChoice({ db, actor }: Context, region: string | null): Promise<void> {
  await db
    .insert(carbonChoices)
    .values({ companyId: actor.companyId, region })
    .onConflictDoUpdate({
      target: carbonChoices.companyId,
      set: { region, version: sql`${carbonChoices.version} + 1` },
    });
}
