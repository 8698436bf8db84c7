import type pg from 'pg';
import { markPump } from '#server/db/rollup-marks.ts';
import { RUN_COLUMNS, type StoredRun, toRun } from '#server/db/stored-run.ts';
import type { Transaction } from '#server/db/transaction.ts';
import { READING_COLUMNS, type ReadingRow, toReading } from '#server/ingest/reading-row.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import type { Run } from '#shared/domain/runs/run.ts';
import { toRunJson } from './fold-repository.ts';

type Database = Pick<pg.ClientBase, 'query'>;

/** The stored runs of a pump that began at or after an instant, and the one before them, in order. */
export async function listStoredRuns(database: Database, pumpId: string, from: number): Promise<Run[]> {
  const { rows } = await database.query<StoredRun>(
    `select ${RUN_COLUMNS} from runs where pump_id = $1 and from_at >= coalesce(
       (select max(from_at) from runs where pump_id = $1 and from_at < to_timestamp($2::float8 / 1000)), '-infinity')
     order by from_at`,
    [pumpId, from],
  );
  return rows.map(toRun);
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
  db: Pick<Transaction, 'execute'>,
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
       gallons, gallons_sigma, closed_inputs, active_input, source, expected_source, flags)
     select p.id, p.company_id, to_timestamp(r.from_at / 1000), to_timestamp(r.to_at / 1000), r.covered_ms, r.watt_hours,
       r.expected_rpm, r.mean_rpm, r.mean_watts, r.gallons, r.gallons_sigma, r.closed_inputs, r.active_input, r.source, r.expected_source,
       r.flags
     from json_to_recordset($1::json) as r(pump_id uuid, from_at float8, to_at float8, covered_ms bigint,
       watt_hours float8, expected_rpm real, mean_rpm real, mean_watts real, gallons real, gallons_sigma real, closed_inputs int2,
       active_input int2, source text, expected_source text, flags text[])
     join pumps p on p.id = r.pump_id`,
    [`[${runs.map((run) => toRunJson(pumpId, run)).join(',')}]`],
  );
  // The rollups follow: every day that the stretch touches is worked out again.
  await markPump(db, pumpId, { kind: 'days', from, to });
  return true;
}
