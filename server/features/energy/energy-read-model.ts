import { sql } from 'drizzle-orm';
import { epochMs, instantOfMs } from '#server/db/epoch-ms.ts';
import type { Transaction } from '#server/db/transaction.ts';

/** A pump as energy is reckoned for it; instants in ms. */
export type EnergyPump = {
  readonly pumpId: string;
  readonly pumpName: string;
  readonly purpose: 'filter' | 'booster' | 'spa' | 'feature';
  readonly padId: string;
  readonly padName: string;
  readonly zone: string;
  readonly poolGallons: number | null;
  readonly turnoversPerDay: number | null;
  readonly rolledTo: number | null;
  readonly region: string | null;
};

const pumpColumns = sql`
  p.id as "pumpId", p.name as "pumpName", p.purpose, p.pad_id as "padId", pad.name as "padName", pad.zone,
  pad.pool_gallons as "poolGallons", pad.turnovers_per_day as "turnoversPerDay",
  case when c.rolled_to > '-infinity' then ${epochMs(sql`c.rolled_to`)} end as "rolledTo",
  (select choice.region from carbon_choices choice where choice.company_id = p.company_id) as region`;

/** One pump, if the person may see it. */
export async function findEnergyPump(db: Transaction, pumpId: string): Promise<EnergyPump | undefined> {
  const { rows } = await db.execute<EnergyPump>(sql`
    select ${pumpColumns} from pumps p join pads pad on pad.id = p.pad_id
    left join rollup_cursors c on c.pump_id = p.id where p.id = ${pumpId}`);
  return rows[0];
}

/** The monitored pumps of a pad, the filter first, if the person may see it. */
export async function listEnergyPumps(db: Transaction, padId: string): Promise<EnergyPump[]> {
  const { rows } = await db.execute<EnergyPump>(sql`
    select ${pumpColumns} from pumps p join pads pad on pad.id = p.pad_id
    left join rollup_cursors c on c.pump_id = p.id
    where p.pad_id = ${padId} and p.monitored order by p.purpose <> 'filter', p.number`);
  return rows;
}

/** A pad, if the person may see it. */
export async function findEnergyPad(
  db: Transaction,
  padId: string,
): Promise<
  | { padId: string; padName: string; zone: string; poolGallons: number | null; turnoversPerDay: number | null }
  | undefined
> {
  const { rows } = await db.execute<{
    padId: string;
    padName: string;
    zone: string;
    poolGallons: number | null;
    turnoversPerDay: number | null;
  }>(sql`select id as "padId", name as "padName", zone, pool_gallons as "poolGallons",
    turnovers_per_day as "turnoversPerDay" from pads where id = ${padId}`);
  return rows[0];
}

/** A stored day. Times in ms. */
export type EnergyDay = {
  readonly pumpId: string;
  readonly day: string;
  readonly from: number;
  readonly to: number;
  readonly wattHours: number;
  readonly gallons: number;
  readonly gallonsSigma: number | null;
  readonly unknownFlowMs: number;
  readonly onMs: number;
  readonly coveredMs: number;
  readonly rpmMean: number | null;
  readonly rpmMin: number | null;
  readonly rpmMax: number | null;
  readonly wattsMean: number | null;
  readonly wattsMax: number | null;
  readonly sourceMs: readonly number[];
  /** What the day's price goes by; null and empty where it has none yet. */
  readonly pricedBy: string | null;
  readonly kwhByPeriod: readonly number[];
  readonly energyMicrosByPeriod: readonly number[];
  readonly demandMicros: number;
  /** What it was compared by; null, and the rest null, where it was not or cannot be. */
  readonly comparedBy: string | null;
  readonly beforeKwh: number | null;
  readonly beforeMicros: number | null;
  readonly afterKwh: number | null;
  readonly afterMicros: number | null;
};

/** Stored days of some pumps, in order. */
export async function listEnergyDays(
  db: Transaction,
  pumpIds: readonly string[],
  { from, until }: { readonly from: string; readonly until: string },
): Promise<EnergyDay[]> {
  const { rows } = await db.execute<EnergyDay>(sql`
    select pump_id as "pumpId", day::text as day, ${epochMs(sql`from_at`)} as "from", ${epochMs(sql`to_at`)} as "to",
      watt_hours as "wattHours", gallons, gallons_sigma as "gallonsSigma", unknown_flow_ms as "unknownFlowMs",
      on_ms as "onMs", covered_ms as "coveredMs", rpm_mean as "rpmMean", rpm_min as "rpmMin", rpm_max as "rpmMax",
      watts_mean as "wattsMean", watts_max as "wattsMax", array_to_json(source_ms) as "sourceMs",
      priced_by as "pricedBy", coalesce(array_to_json(kwh_by_period), '[]') as "kwhByPeriod",
      coalesce(array_to_json(energy_micros_by_period), '[]') as "energyMicrosByPeriod",
      coalesce(demand_micros, 0) as "demandMicros", compared_by as "comparedBy", before_kwh as "beforeKwh",
      before_micros as "beforeMicros", after_kwh as "afterKwh", after_micros as "afterMicros"
    from pump_days
    where pump_id = any(${sql.param(pumpIds)}::uuid[]) and day >= ${from}::date and day < ${until}::date
    order by pump_id, day`);
  return rows;
}

/** The longest gaps of a pump in a stretch, and how many there are. */
export async function listGaps(
  db: Transaction,
  pumpId: string,
  { from, to }: { readonly from: number; readonly to: number },
  limit: number,
): Promise<{ gaps: { from: number; to: number }[]; count: number }> {
  const { rows } = await db.execute<{ from: number; to: number; count: number }>(sql`
    select ${epochMs(sql`greatest(from_at, ${instantOfMs(from)})`)} as "from",
      ${epochMs(sql`least(to_at, ${instantOfMs(to)})`)} as "to", (count(*) over ())::int as count
    from runs where pump_id = ${pumpId} and source = 'no-data'
      and from_at < ${instantOfMs(to)} and to_at > ${instantOfMs(from)}
    order by to_at - from_at desc limit ${limit}`);
  return { gaps: rows.map(({ from: begin, to: end }) => ({ from: begin, to: end })), count: rows[0]?.count ?? 0 };
}
