import { sql } from 'drizzle-orm';
import type { DayTerm } from '#shared/domain/energy/price-days.ts';
import type { Tariff } from '#shared/domain/energy/tariff.ts';
import { epochDayOf } from './day-text.ts';
import type { Transaction } from './transaction.ts';

/** What a pad's energy is priced by. */
export type PadPrices = {
  readonly terms: readonly DayTerm[];
  /** Names of the tariffs, by id. */
  readonly names: ReadonlyMap<string, string>;
  /** Nothing but the pad hangs on the meter. */
  readonly ownMeter: boolean;
  readonly otherKwhByPeriod: readonly number[];
};

type TermRow = {
  readonly padId: string;
  readonly ownMeter: boolean;
  readonly otherKwhByPeriod: readonly number[];
  readonly id: string;
  readonly name: string;
  readonly tariff: Tariff;
  readonly fromDay: string;
  readonly toDay: string | null;
};

const NOTHING: PadPrices = { terms: [], names: new Map(), ownMeter: false, otherKwhByPeriod: [] };

/** The prices of some pads: by the plan of their own, else by the company's. A pad without either is not in the answer. */
export async function listPadPrices(
  db: Pick<Transaction, 'execute'>,
  padIds: readonly string[],
): Promise<Map<string, PadPrices>> {
  const { rows } = await db.execute<TermRow>(sql`
    select pad.id as "padId", plan.own_meter as "ownMeter", plan.other_kwh_by_period as "otherKwhByPeriod",
      t.id, t.name, t.tariff, term.from_day::text as "fromDay", term.to_day::text as "toDay"
    from pads pad
    join lateral (select p.* from tariff_plans p
      where p.company_id = pad.company_id and (p.pad_id = pad.id or p.pad_id is null)
        and exists (select from tariff_terms one where one.plan_id = p.id)
      order by p.pad_id nulls last limit 1) plan on true
    join tariff_terms term on term.plan_id = plan.id
    join tariffs t on t.id = term.tariff_id
    where pad.id = any(${sql.param(padIds)}::uuid[])
    order by pad.id, term.from_day`);
  const prices = new Map<string, PadPrices>();
  for (const padId of new Set(rows.map((row) => row.padId))) {
    const own = rows.filter((row) => row.padId === padId);
    const [first] = own;
    prices.set(padId, {
      terms: own.map(toTerm),
      names: new Map(own.map(({ id, name }) => [id, name])),
      ownMeter: first?.ownMeter ?? false,
      otherKwhByPeriod: first?.otherKwhByPeriod ?? [],
    });
  }
  return prices;
}

/** The prices of one pad; without a plan it has no terms. */
export const findPadPrices = async (db: Pick<Transaction, 'execute'>, padId: string): Promise<PadPrices> =>
  (await listPadPrices(db, [padId])).get(padId) ?? NOTHING;

const toTerm = ({ id, tariff, fromDay, toDay }: TermRow): DayTerm => ({
  id,
  tariff,
  fromDay: epochDayOf(fromDay),
  toDay: toDay === null ? undefined : epochDayOf(toDay),
});
