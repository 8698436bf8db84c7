import type { z } from 'zod';
import type { Context } from '#server/context.ts';
import { recordAct } from '#server/db/record-act.ts';
import { invalid } from '#server/errors.ts';
import { changedMeanwhile, type ExpectedVersion, requireVersion } from '#server/http/etag.ts';
import type { CarbonSettings } from '#shared/contract/http/tariffs.ts';
import { CARBON_FACTORS } from '#shared/domain/energy/carbon-factors.data.ts';
import { findCarbonChoice, saveCarbonChoice } from './carbon-repository.ts';

const REGIONS = [...new Set(CARBON_FACTORS.map(({ region }) => region))];

/** The grid whose emission factors the company uses. */
export async function readCarbon(context: Context): Promise<z.infer<typeof CarbonSettings>> {
  const row = await findCarbonChoice(context);
  return { region: row?.region ?? null, regions: REGIONS, version: row?.version ?? 0 };
}

type Choice = { readonly region: string | null; readonly ifMatch: ExpectedVersion };

/** Chooses another grid, or none. */
export async function chooseCarbon(context: Context, { region, ifMatch }: Choice) {
  const known = await readCarbon(context);
  requireVersion(ifMatch, known.version);
  if (region !== null && !REGIONS.includes(region)) throw invalid('region', `is one of ${REGIONS.join(', ')}, or null`);
  if (!(await saveCarbonChoice(context, region, known.version))) throw changedMeanwhile();
  const { companyId } = context.actor;
  await recordAct(context, { action: 'carbon.chosen', subjectKind: 'company', subjectId: companyId });
  return readCarbon(context);
}
