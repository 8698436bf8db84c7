import { eq, sql } from 'drizzle-orm';
import type { z } from 'zod';
import type { Context } from '#server/context.ts';
import { recordAct } from '#server/db/record-act.ts';
import { carbonChoices } from '#server/db/schema/carbon-choices.ts';
import { invalid } from '#server/errors.ts';
import { type ExpectedVersion, requireVersion } from '#server/http/etag.ts';
import type { CarbonSettings } from '#shared/contract/http/tariffs.ts';
import { CARBON_FACTORS } from '#shared/domain/energy/carbon-factors.data.ts';

const REGIONS = [...new Set(CARBON_FACTORS.map(({ region }) => region))];

/** The grid whose emission factors the company uses. */
export async function readCarbon({ db, actor }: Context): Promise<z.infer<typeof CarbonSettings>> {
  const [row] = await db.select().from(carbonChoices).where(eq(carbonChoices.companyId, actor.companyId));
  return { region: row?.region ?? null, regions: REGIONS, version: row?.version ?? 0 };
}

type Choice = { readonly region: string | null; readonly ifMatch: ExpectedVersion };

/** Chooses another grid, or none. */
export async function chooseCarbon(context: Context, { region, ifMatch }: Choice) {
  const known = await readCarbon(context);
  requireVersion(ifMatch, known.version);
  if (region !== null && !REGIONS.includes(region)) throw invalid('region', `is one of ${REGIONS.join(', ')}, or null`);
  const { companyId } = context.actor;
  await context.db
    .insert(carbonChoices)
    .values({ companyId, region })
    .onConflictDoUpdate({
      target: carbonChoices.companyId,
      set: { region, version: sql`${carbonChoices.version} + 1` },
    });
  await recordAct(context, { action: 'carbon.chosen', subjectKind: 'company', subjectId: companyId });
  return readCarbon(context);
}
