import { type SQL, sql } from 'drizzle-orm';
import { epochMs } from '#server/db/epoch-ms.ts';
import { likePattern } from '#server/db/like-pattern.ts';
import type { AdviceBasis } from '#server/db/schema/program-advice.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { SortKeys } from '#server/http/page-cursor.ts';
import type { ProgramsQuery } from '#shared/contract/http/energy-programs.ts';
import type { KeptAdvice } from '#shared/domain/advisor/advise-pump.ts';
import { COSTLY_PROGRAM } from '#shared/domain/advisor/judge-costly-program.ts';
import type { TimeOfUseFinding } from '#shared/domain/energy/time-of-use-check.ts';

export type ProgramRecord = {
  readonly rank: number;
  readonly pumpId: string;
  readonly padId: string;
  readonly padName: string;
  readonly pumpName: string;
  readonly customerName: string | null;
  readonly area: string | null;
  readonly madeAt: number;
  readonly savedShare: number | null;
  readonly savedMicrosPerMonth: number | null;
  readonly basis: AdviceBasis;
  readonly advice: KeptAdvice;
  readonly dearHours: readonly TimeOfUseFinding[];
};

const LAST = 1e18;

const SHOWN: Readonly<Record<ProgramsQuery['show'], SQL>> = {
  costly: sql`a.kind = 'advice' and a.saved_share >= ${COSTLY_PROGRAM.savedShare}::real`,
  'dear-hours': sql`a.dear_micros_per_year > 0`,
  all: sql`true`,
};

const RANK: Readonly<Record<ProgramsQuery['sort'], SQL>> = {
  saved: sql`coalesce(-a.saved_micros_per_month, ${LAST}::float8)`,
  share: sql`coalesce(-a.saved_share, ${LAST}::float8)`,
  name: sql`0::float8`,
};

const adviceColumns = sql`
  a.pump_id as "pumpId", p.pad_id as "padId", pad.name as "padName", p.name as "pumpName", customer.name as "customerName",
  pad.area, ${epochMs(sql`a.made_at`)} as "madeAt", a.saved_share as "savedShare",
  a.saved_micros_per_month as "savedMicrosPerMonth", a.basis, a.advice, a.dear_hours as "dearHours"`;

const adviceFrom = sql`
  program_advice a join pumps p on p.id = a.pump_id join pads pad on pad.id = p.pad_id
  left join pad_ownerships o on o.pad_id = pad.id and o.starts_at <= now() and (o.ends_at is null or o.ends_at > now())
  left join customers customer on customer.id = o.customer_id`;

/** One page of advice, worst first, and how many match. */
export async function listProgramRecords(
  db: Transaction,
  companyId: string,
  query: ProgramsQuery,
  after: SortKeys | undefined,
): Promise<{ rows: ProgramRecord[]; matching: number; advised: number; waiting: number }> {
  const asked = [sql`a.company_id = ${companyId}`, SHOWN[query.show]];
  if (query.area !== undefined) asked.push(sql`pad.area = ${query.area}`);
  if (query.q !== undefined && query.q !== '')
    asked.push(sql`(pad.name ilike ${likePattern(query.q)} or customer.name ilike ${likePattern(query.q)})`);
  const where = sql.join(asked, sql` and `);
  const rank = RANK[query.sort];
  const beyond =
    after === undefined
      ? sql`true`
      : sql`(${rank}, lower(pad.name), a.pump_id::text) > (${after[0]}::float8, lower(${after[1]}::text), ${after[2]}::text)`;
  const { rows } = await db.execute<ProgramRecord>(sql`
    select (${rank})::float8 as rank, ${adviceColumns} from ${adviceFrom} where ${where} and ${beyond}
    order by 1, lower(pad.name), a.pump_id::text limit ${query.limit + 1}`);
  const counts = await db.execute<{ matching: number; advised: number; waiting: number }>(sql`
    select (select count(*)::int from ${adviceFrom} where ${where}) as matching,
      (select count(*)::int from program_advice a where a.company_id = ${companyId}) as advised,
      (select count(*)::int from pumps p where p.company_id = ${companyId} and p.monitored
        and not exists (select from program_advice a where a.pump_id = p.id)) as waiting`);
  return { rows, ...(counts.rows[0] ?? { matching: 0, advised: 0, waiting: 0 }) };
}

/** The advice for one pump, and whether the person may see the pump at all. */
export async function findProgramRecord(
  db: Transaction,
  pumpId: string,
): Promise<{ isPump: boolean; record: ProgramRecord | undefined }> {
  const { rows } = await db.execute<ProgramRecord>(
    sql`select 0::float8 as rank, ${adviceColumns} from ${adviceFrom} where a.pump_id = ${pumpId}`,
  );
  if (rows[0] !== undefined) return { isPump: true, record: rows[0] };
  const known = await db.execute(sql`select from pumps where id = ${pumpId}`);
  return { isPump: known.rows.length > 0, record: undefined };
}
