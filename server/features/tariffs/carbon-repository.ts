import { eq } from 'drizzle-orm';
import type { Context } from '#server/context.ts';
import { carbonChoices } from '#server/db/schema/carbon-choices.ts';

/** The grid a company chose; undefined where nothing was said yet. */
export async function findCarbonChoice({ db, actor }: Context) {
  const [row] = await db.select().from(carbonChoices).where(eq(carbonChoices.companyId, actor.companyId));
  return row;
}

/** Chooses a grid over the version that was read; false where another came first. */
export async function saveCarbonChoice(
  { db, actor }: Context,
  region: string | null,
  version: number,
): Promise<boolean> {
  const written = await db
    .insert(carbonChoices)
    .values({ companyId: actor.companyId, region })
    .onConflictDoUpdate({
      target: carbonChoices.companyId,
      set: { region, version: version + 1 },
      setWhere: eq(carbonChoices.version, version),
    })
    .returning({ version: carbonChoices.version });
  return written.length > 0;
}
