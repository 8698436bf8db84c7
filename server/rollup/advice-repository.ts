import { sql } from 'drizzle-orm';
import type pg from 'pg';
import { instantOfMs } from '#server/db/epoch-ms.ts';
import type { AdviceBasis } from '#server/db/schema/program-advice.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { PumpAdvice } from '#shared/domain/advisor/advise-pump.ts';

/** Filter pumps whose program was not looked at for a day, those never looked at first; `but` are left out. */
export async function listUnadvisedPumps(
  database: Pick<pg.Pool, 'query'>,
  limit: number,
  but: readonly string[] = [],
): Promise<string[]> {
  const { rows } = await database.query<{ id: string }>(
    `select p.id from pumps p left join program_advice a on a.pump_id = p.id
     where p.monitored and p.purpose = 'filter' and (a.pump_id is null or a.made_at < now() - interval '1 day')
       and p.id <> all($2::uuid[])
     order by a.made_at nulls first, p.number limit $1`,
    [limit, but],
  );
  return rows.map(({ id }) => id);
}

/** Puts the advice for a pump in the place of the last one. */
export async function saveAdvice(
  db: Pick<Transaction, 'execute'>,
  pump: { readonly pumpId: string; readonly companyId: string },
  basis: AdviceBasis,
  made: PumpAdvice,
  now: number,
): Promise<void> {
  const { advice, dearHours, savedMicrosPerMonth = null, savedShare = null } = made;
  const dear = dearHours.reduce((sum, { extraMicrosPerYear }) => sum + extraMicrosPerYear, 0);
  await db.execute(sql`
    insert into program_advice (pump_id, company_id, made_at, saved_micros_per_month, dear_micros_per_year, saved_share,
      kind, basis, advice, dear_hours)
    values (${pump.pumpId}, ${pump.companyId}, ${instantOfMs(now)}, ${savedMicrosPerMonth}, ${dear}, ${savedShare},
      ${advice.kind}, ${JSON.stringify(basis)}::jsonb, ${JSON.stringify(advice)}::jsonb, ${JSON.stringify(dearHours)}::jsonb)
    on conflict (pump_id) do update set made_at = excluded.made_at,
      saved_micros_per_month = excluded.saved_micros_per_month, dear_micros_per_year = excluded.dear_micros_per_year,
      saved_share = excluded.saved_share, kind = excluded.kind, basis = excluded.basis, advice = excluded.advice,
      dear_hours = excluded.dear_hours`);
}
