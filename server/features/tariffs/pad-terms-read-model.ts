import { sql } from 'drizzle-orm';
import { instantOfMs } from '#server/db/epoch-ms.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { PadWithTerms } from '#shared/contract/http/tariffs.ts';

/** Enough to look through; more are found by name. */
const MOST = 500;

/** Pads of the company with terms of their own by name, each with the tariff in force on its own day, and how many there are. */
export async function listPadTermRows(
  db: Transaction,
  companyId: string,
  now: number,
): Promise<(PadWithTerms & { readonly count: number })[]> {
  const at = instantOfMs(now);
  const { rows } = await db.execute<PadWithTerms & { readonly count: number }>(sql`
    select pad.id as "padId", pad.name as "padName", customer.name as "customerName", pad.zone,
      (select term.tariff_id from tariff_terms term where term.plan_id = plan.id
        and term.from_day <= (${at} at time zone pad.zone)::date
        and (term.to_day is null or term.to_day > (${at} at time zone pad.zone)::date)) as "tariffId",
      own.terms, (count(*) over ())::int as count
    from tariff_plans plan join pads pad on pad.id = plan.pad_id
    cross join lateral (select count(*)::int as terms from tariff_terms term where term.plan_id = plan.id) own
    left join pad_ownerships owner on owner.pad_id = pad.id and owner.starts_at <= ${at}
      and (owner.ends_at is null or owner.ends_at > ${at})
    left join customers customer on customer.id = owner.customer_id
    where plan.company_id = ${companyId} and own.terms > 0
    order by pad.name collate millrace_natural, pad.id limit ${MOST}`);
  return rows;
}
