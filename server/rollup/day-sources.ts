import type pg from 'pg';
import { RUN_COLUMNS, type StoredRun, toRun } from '#server/db/stored-run.ts';
import type { SlicedReading } from '#shared/domain/rollup/fill-slices.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import type { TakenPump } from './rollup-work.ts';

type Database = Pick<pg.ClientBase, 'query'>;
type Span = { readonly from: number; readonly to: number };

/** Readings farther apart than this are a gap whatever the device's interval (at most 60 s, three of them). */
const REACH_MS = 3_600_000;

/** A pump's runs that share time with a stretch, in order. */
export async function listRunsOver(database: Database, pumpId: string, { from, to }: Span): Promise<Run[]> {
  const { rows } = await database.query<StoredRun>({
    name: 'rollup-runs',
    text: `select ${RUN_COLUMNS} from runs where pump_id = $1 and from_at < to_timestamp($3::float8 / 1000)
       and from_at >= coalesce((select max(from_at) from runs where pump_id = $1 and from_at <= to_timestamp($2::float8 / 1000)),
         '-infinity')
     order by from_at`,
    values: [pumpId, from, to],
  });
  return rows.map(toRun).filter((run) => run.to === undefined || run.to > from);
}

/**
 * A pump's readings over a stretch, with the one before it and the one after, as far as they have been understood: none
 * after the fold's high water.
 */
export async function listReadingsOver(
  database: Database,
  { pumpNumber, highWater }: Pick<TakenPump, 'pumpNumber' | 'highWater'>,
  { from, to }: Span,
): Promise<SlicedReading[]> {
  const { rows } = await database.query<[number, number, number, number]>({
    name: 'rollup-readings',
    rowMode: 'array',
    text: `select date_part('epoch', at) * 1000, rpm, watts, closed_inputs from readings
     where pump_number = $1
       and at >= coalesce((select max(at) from readings where pump_number = $1 and at < to_timestamp($2::float8 / 1000)
         and at >= to_timestamp($4::float8 / 1000)), to_timestamp($2::float8 / 1000))
       and at <= least(to_timestamp($6::float8 / 1000), coalesce((select min(at) from readings where pump_number = $1
         and at >= to_timestamp($3::float8 / 1000) and at <= to_timestamp($5::float8 / 1000)), to_timestamp($3::float8 / 1000)))
     order by at`,
    values: [pumpNumber, from, to, from - REACH_MS, to + REACH_MS, highWater],
  });
  return rows.map(([at, rpm, watts, closedInputs]) => ({ at: Math.round(at), rpm, watts, closedInputs }));
}

/** When a pump's first run begins, ms; undefined without any. */
export async function findFirstRun(database: Database, pumpId: string): Promise<number | undefined> {
  const { rows } = await database.query<{ from: number | null }>(
    `select round(date_part('epoch', min(from_at)) * 1000) as from from runs where pump_id = $1`,
    [pumpId],
  );
  return rows[0]?.from ?? undefined;
}
