import { type SQL, sql } from 'drizzle-orm';
import type { Context } from '#server/context.ts';
import { markPrices } from '#server/db/rollup-marks.ts';

/** Whose prices change: pumps of one pad, or of every pad that goes by the company's plan. */
export const pumpsOfPad = (padId: string): SQL => sql`p.pad_id = ${padId}`;
export const pumpsOfCompanyPlan = sql`not exists (select from tariff_plans own
  where own.pad_id = p.pad_id and exists (select from tariff_terms term where term.plan_id = own.id))`;

/** Pumps priced by a tariff, through the plan of their pad or of the company. */
export const pumpsOfTariff = (tariffId: string): SQL => sql`(exists (select from tariff_plans own
    join tariff_terms term on term.plan_id = own.id where own.pad_id = p.pad_id and term.tariff_id = ${tariffId})
  or ${pumpsOfCompanyPlan} and exists (select from tariff_plans whole join tariff_terms term on term.plan_id = whole.id
    where whole.pad_id is null and term.tariff_id = ${tariffId}))`;

/** Has everything these pumps of the company used so far priced anew. */
export const markCompanyPrices = ({ db, actor, now }: Context, which: SQL): Promise<void> =>
  markPrices(db, sql`p.company_id = ${actor.companyId} and p.monitored and ${which}`, now);
