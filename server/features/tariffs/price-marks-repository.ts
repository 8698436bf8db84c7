import { type SQL, sql } from 'drizzle-orm';
import type { Context } from '#server/context.ts';
import { instantOfMs } from '#server/db/epoch-ms.ts';

/** Whose prices change: pumps of one pad, or of every pad that goes by the company's plan. */
export const pumpsOfPad = (padId: string): SQL => sql`p.pad_id = ${padId}`;
export const pumpsOfCompanyPlan = sql`not exists (select from tariff_plans own
  where own.pad_id = p.pad_id and exists (select from tariff_terms term where term.plan_id = own.id))`;

/** Pumps priced by a tariff, through the plan of their pad or of the company. */
export const pumpsOfTariff = (tariffId: string): SQL => sql`(exists (select from tariff_plans own
    join tariff_terms term on term.plan_id = own.id where own.pad_id = p.pad_id and term.tariff_id = ${tariffId})
  or ${pumpsOfCompanyPlan} and exists (select from tariff_plans whole join tariff_terms term on term.plan_id = whole.id
    where whole.pad_id is null and term.tariff_id = ${tariffId}))`;

/** Has everything these pumps used so far priced anew, by the worker. */
export async function markPrices({ db, actor, now }: Context, which: SQL): Promise<void> {
  await db.execute(sql`
    insert into rollup_marks (id, company_id, pump_id, kind, from_at, to_at)
    select gen_random_uuid(), p.company_id, p.id, 'prices', 'epoch'::timestamptz, ${instantOfMs(now)}
    from pumps p where p.company_id = ${actor.companyId} and p.monitored and ${which}`);
}
