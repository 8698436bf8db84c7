import { type SQL, sql } from 'drizzle-orm';
import { likePattern } from '#server/db/like-pattern.ts';
import { openAlarmMarks } from '#server/features/pumps/index.ts';
import type { FleetQuery } from '#shared/contract/http/pumps.ts';
import { STANDSTILL_RPM } from '#shared/domain/control/speed-tolerance.ts';

/** Matches the pad, the pump, the customer and the device. Sub-selects without parameters are worked out once. */
function matches(text: string): SQL {
  const pattern = likePattern(text);
  return sql`(pad.name ilike ${pattern} or pad.street ilike ${pattern} or pad.town ilike ${pattern} or p.name ilike ${pattern}
    or pad.id in (select o.pad_id from pad_ownerships o join customers c on c.id = o.customer_id
      where c.name ilike ${pattern} and o.starts_at <= now() and (o.ends_at is null or o.ends_at > now()))
    or p.id in (select f.pump_id from device_fittings f join devices d on d.id = f.device_id
      where d.serial ilike ${pattern} and f.starts_at <= now() and (f.ends_at is null or f.ends_at > now())))`;
}

/**
 * One narrow row for every pump the person may see that search and area keep: what filters, sorts and totals need.
 * A silent pump neither runs nor idles, since nobody knows; one that stands although a speed is due does not idle.
 */
export function fleetBase({ q, area }: Pick<FleetQuery, 'q' | 'area'>): SQL {
  const kept = [sql`p.monitored`];
  if (q !== undefined && q !== '') kept.push(matches(q));
  if (area !== undefined) kept.push(sql`pad.area = ${area}`);
  const rpm = sql`(s.now ->> 'rpm')::float8`;
  const expectedRpm = sql`(s.now ->> 'expectedRpm')::float8`;
  return sql`
    select p.id, lower(pad.name || ' ' || p.name) as name, ${rpm} as rpm, (s.now ->> 'watts')::float8 as watts,
      s.now ->> 'source' as source, (s.now ->> 'primed')::boolean as primed,
      abs(${rpm} - ${expectedRpm}) > greatest(40, 0.02 * ${expectedRpm}) as off_expected,
      s.silent_since is not null as silent,
      s.silent_since is null and ${rpm} > ${STANDSTILL_RPM}::float8 as running,
      s.silent_since is null and greatest(${rpm}, ${expectedRpm}) <= ${STANDSTILL_RPM}::float8 as idle,
      extract(epoch from s.heard_at)::float8 as heard,
      mark.priority, mark.acknowledged, mark.detector
    from pumps p join pads pad on pad.id = p.pad_id
    left join pump_states s on s.pump_id = p.id
    left join (${openAlarmMarks()}) mark on mark.pump_id = p.id
    where ${sql.join(kept, sql` and `)}`;
}
