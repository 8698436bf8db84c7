import type pg from 'pg';
import { dayText } from '#server/db/day-text.ts';
import type { DayRollup } from '#shared/domain/rollup/roll-up-day.ts';
import type { TakenPump } from './rollup-work.ts';

type Database = Pick<pg.ClientBase, 'query'>;

const HOURS = 24;
const WATT_MS_PER_WH = 3_600_000;

/** A day's watt-hours by wall-clock hour: a doubled hour's are together. */
function byWallHour({ hours }: DayRollup): number[] {
  const sums = Array.from({ length: HOURS }, () => 0);
  for (const { hour, wattMs } of hours) sums[hour] = (sums[hour] ?? 0) + wattMs / WATT_MS_PER_WH;
  return sums;
}

/**
 * Adds what a pump's day differs from what is stored of it to the company's day, so that a fleet's day is one row however
 * many pumps it has. To be called before the new day is written, in its transaction. Hours are added by wall clock; the
 * stored ones have a doubled hour apart, and know which they are: the pad may have been given another zone since.
 */
export async function addToCompanyDay(
  database: Database,
  { companyId, pumpId }: Pick<TakenPump, 'companyId' | 'pumpId'>,
  rollup: DayRollup,
): Promise<void> {
  const wallHours = rollup.hours.map(({ hour }) => hour);
  await database.query({
    name: 'rollup-company-day',
    text: `with old as (
        select array(select coalesce(sum(wh), 0)::float8 from generate_series(0, 23) wall(hour)
          left join unnest(h.watt_hours, coalesce(h.wall_hours, $5::int2[])) as stored(wh, hour) on stored.hour = wall.hour
          group by wall.hour order by wall.hour) as hours
        from pump_day_hours h where h.pump_id = $2 and h.day = $3::date),
      delta as (
        select array(select fresh.wh - coalesce((select o.hours[fresh.place] from old o), 0)
          from unnest($4::float8[]) with ordinality as fresh(wh, place) order by fresh.place) as hours,
          case when exists (select from old) then 0 else 1 end as pumps)
      insert into company_days as c (company_id, day, pumps, watt_hours, hour_watt_hours)
      select $1, $3::date, d.pumps, (select sum(x) from unnest(d.hours) x), d.hours from delta d
      on conflict (company_id, day) do update set pumps = c.pumps + excluded.pumps,
        watt_hours = c.watt_hours + excluded.watt_hours,
        hour_watt_hours = array(select a + b from unnest(c.hour_watt_hours, excluded.hour_watt_hours) as both_of(a, b))`,
    values: [companyId, pumpId, dayText(rollup.day.epochDay), byWallHour(rollup), wallHours],
  });
}
