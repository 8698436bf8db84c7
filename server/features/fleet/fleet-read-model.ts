import { type SQL, sql } from 'drizzle-orm';
import type { Transaction } from '#server/db/transaction.ts';
import type { SortKeys } from '#server/http/page-cursor.ts';
import type { FleetPage, FleetQuery } from '#shared/contract/http/pumps.ts';
import { fleetBase } from './fleet-base-read-model.ts';

/** A place in the fleet's order. */
export type FleetPlace = { readonly id: string; readonly rank: number; readonly name: string };

export type FleetPlaces = {
  readonly places: readonly FleetPlace[];
  readonly totals: FleetPage['totals'];
  readonly matching: number;
  readonly areas: readonly string[];
};

/** Every order is ascending in a number, then by name as people sort names. What is unknown comes last. */
const RANKS: Readonly<Record<FleetQuery['sort'], SQL>> = {
  worst: sql`case priority when 'urgent' then 0 when 'soon' then 2 when 'note' then 4 else 6 end
    + case when acknowledged then 1 else 0 end`,
  name: sql`0`,
  rpm: sql`-coalesce(rpm, -1)`,
  watts: sql`-coalesce(watts, -1)`,
  // The one not heard for longest first: that is what one sorts by it for.
  heard: sql`coalesce(heard, 1e15)`,
};

const FILTERS: Readonly<Record<NonNullable<FleetQuery['filter']>, SQL>> = {
  running: sql`running`,
  'on-input': sql`source = 'input' and not silent`,
  'prime-trouble': sql`(primed is false or detector in ('failed-prime', 'slow-prime', 'loss-of-prime'))`,
  'off-expected': sql`(off_expected and source <> 'prime' and not silent
    or detector in ('wrong-speed', 'stopped', 'unexpected-run', 'input-disagreement'))`,
  silent: sql`silent`,
  alarm: sql`priority is not null`,
};

/** Which pumps make up one page (and one more), in order, with the figures over all of them, from one look. */
export async function listFleetPlaces(
  db: Transaction,
  query: FleetQuery,
  after: SortKeys | undefined,
): Promise<FleetPlaces> {
  const filters: SQL[] = [sql`true`];
  if (query.filter !== undefined) filters.push(FILTERS[query.filter]);
  if (query.priority !== undefined) filters.push(sql`priority = ${query.priority}`);
  const [rank, name, id] = after ?? [];
  const beyond =
    after === undefined
      ? sql`true`
      : sql`(rank, name collate millrace_natural, id) > (${rank}::float8, ${name}::text, ${id}::uuid)`;
  const { rows } = await db.execute<FleetPlaces>(sql`
    with base as materialized (${fleetBase(query)}),
    filtered as materialized (
      select id, name, (${RANKS[query.sort]})::float8 as rank from base where ${sql.join(filters, sql` and `)})
    select
      (select coalesce(json_agg(page), '[]') from (
        select id, rank, name from filtered where ${beyond}
        order by rank, name collate millrace_natural, id limit ${query.limit + 1}) page) as places,
      (select json_build_object('pumps', count(*), 'running', count(*) filter (where running),
        'idle', count(*) filter (where idle), 'urgent', count(*) filter (where priority = 'urgent'),
        'soon', count(*) filter (where priority = 'soon'), 'note', count(*) filter (where priority = 'note'),
        'silent', count(*) filter (where silent)) from base) as totals,
      (select count(*)::int from filtered) as matching,
      (select coalesce(json_agg(area order by area collate millrace_natural), '[]')
        from (select distinct area from pads where area is not null) known) as areas`);
  const [places] = rows;
  if (places === undefined) throw new Error('A query that always answers one row answered none');
  return places;
}
