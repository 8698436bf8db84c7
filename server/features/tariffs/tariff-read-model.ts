import { sql } from 'drizzle-orm';
import { epochMs } from '#server/db/epoch-ms.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { Tariff } from '#shared/domain/energy/tariff.ts';

export type TariffRecord = {
  readonly id: string;
  readonly tariff: Tariff;
  readonly pads: number;
  readonly isCompanys: boolean;
  readonly changedAt: number;
  readonly version: number;
};

/** The company's tariffs by name, or one of them. */
export async function listTariffRows(db: Transaction, companyId: string, tariffId?: string): Promise<TariffRecord[]> {
  const { rows } = await db.execute<TariffRecord>(sql`
    select t.id, t.tariff, t.version, ${epochMs(sql`t.changed_at`)} as "changedAt",
      (select count(distinct p.pad_id)::int from tariff_terms term join tariff_plans p on p.id = term.plan_id
        where term.tariff_id = t.id and p.pad_id is not null) as pads,
      exists (select from tariff_terms term join tariff_plans p on p.id = term.plan_id
        where term.tariff_id = t.id and p.pad_id is null) as "isCompanys"
    from tariffs t
    where t.company_id = ${companyId} and ${tariffId === undefined ? sql`true` : sql`t.id = ${tariffId}`}
    order by t.name collate millrace_natural`);
  return rows;
}
