import type pg from 'pg';
import { READING_COLUMNS, type ReadingRow, toReading } from '#server/ingest/reading-row.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import { toRunJson } from './fold-repository.ts';

type Database = Pick<pg.ClientBase, 'query'>;

/** The stored runs that late readings touch: from the beginning of the first to the end of the last. */
export type TouchedStretch = {
  readonly from: number;
  /** Undefined = the last run is still open. */
  readonly to: number | undefined;
};

/** Finds the stretch of whole runs around two instants; undefined where no run lies there. */
export async function findTouchedStretch(
  database: Database,
  pumpId: string,
  first: number,
  last: number,
): Promise<TouchedStretch | undefined> {
  const { rows } = await database.query<{ from_at: number | null; to_at: number | null }>(
    `select date_part('epoch', coalesce(
         (select max(from_at) from runs where pump_id = $1 and from_at <= to_timestamp($2::float8 / 1000)),
         (select min(from_at) from runs where pump_id = $1))) * 1000 as from_at,
       (select date_part('epoch', min(from_at)) * 1000 from runs
         where pump_id = $1 and from_at > to_timestamp($3::float8 / 1000)) as to_at`,
    [pumpId, first, last],
  );
  const row = rows[0];
  if (row?.from_at === undefined || row.from_at === null) return undefined;
  return { from: Math.min(first, Math.round(row.from_at)), to: row.to_at === null ? undefined : Math.round(row.to_at) };
}

/** When the run that is still open began, ms; undefined where none is. */
export async function findOpenRunStart(database: Database, pumpId: string): Promise<number | undefined> {
  const { rows } = await database.query<{ from_at: number | null }>(
    `select date_part('epoch', max(from_at)) * 1000 as from_at from runs where pump_id = $1 and to_at is null`,
    [pumpId],
  );
  const from = rows[0]?.from_at ?? null;
  return from === null ? undefined : Math.round(from);
}

/** Readings of a pump from an instant to before another, by device time. */
export async function listReadings(
  database: Database,
  pumpNumber: number,
  from: number,
  to: number,
): Promise<Reading[]> {
  const { rows } = await database.query<ReadingRow>(
    `select ${READING_COLUMNS} from readings r
     where r.pump_number = $1 and r.at >= to_timestamp($2::float8 / 1000) and r.at < to_timestamp($3::float8 / 1000)
     order by r.at`,
    [pumpNumber, from, to],
  );
  return rows.map(toReading);
}

/** Puts corrected runs in the place of those that began from `from` to before `to`. The pump must still be ours. */
export async function replaceRuns(
  database: Database,
  {
    epoch,
    pumpId,
    from,
    to,
  }: { readonly epoch: number; readonly pumpId: string; readonly from: number; readonly to: number },
  runs: readonly Run[],
): Promise<boolean> {
  const { rowCount } = await database.query('select from pump_states where pump_id = $1 and epoch = $2 for update', [
    pumpId,
    epoch,
  ]);
  if (rowCount === 0) return false;
  await database.query(
    `delete from runs where pump_id = $1 and from_at >= to_timestamp($2::float8 / 1000)
       and from_at < to_timestamp($3::float8 / 1000)`,
    [pumpId, from, to],
  );
  await database.query(
    `insert into runs (pump_id, company_id, from_at, to_at, covered_ms, watt_hours, expected_rpm, mean_rpm, mean_watts,
       gallons, closed_inputs, active_input, source, expected_source, flags)
     select p.id, p.company_id, to_timestamp(r.from_at / 1000), to_timestamp(r.to_at / 1000), r.covered_ms, r.watt_hours,
       r.expected_rpm, r.mean_rpm, r.mean_watts, r.gallons, r.closed_inputs, r.active_input, r.source, r.expected_source,
       r.flags
     from json_to_recordset($1::json) as r(pump_id uuid, from_at float8, to_at float8, covered_ms bigint,
       watt_hours float8, expected_rpm real, mean_rpm real, mean_watts real, gallons real, closed_inputs int2,
       active_input int2, source text, expected_source text, flags text[])
     join pumps p on p.id = r.pump_id`,
    [`[${runs.map((run) => toRunJson(pumpId, run)).join(',')}]`],
  );
  return true;
}
