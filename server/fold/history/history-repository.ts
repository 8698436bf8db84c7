import type pg from 'pg';
import { toRunJson } from '../fold-repository.ts';
import { encodeHot } from '../saved-hot.ts';
import type { HistoryPump } from './history-pump.ts';

type Database = Pick<pg.ClientBase, 'query'>;

/** Who is responsible for each pump's pad, by pump. */
export async function listTechnicians(database: Database): Promise<Map<string, string>> {
  const { rows } = await database.query<{ pump_id: string; technician_id: string }>(
    `select p.id as pump_id, pad.technician_id from pumps p join pads pad on pad.id = p.pad_id
     where pad.technician_id is not null`,
  );
  return new Map(rows.map((row) => [row.pump_id, row.technician_id]));
}

/** Makes the daily partitions between two instants, ms. */
export async function makePartitionsBetween(database: Database, from: number, to: number): Promise<void> {
  const day = (at: number): string => new Date(at).toISOString().slice(0, 10);
  await database.query('select millrace_make_reading_partitions($1::date, $2::date)', [day(from), day(to)]);
}

const RUNS = `insert into runs (pump_id, company_id, from_at, to_at, covered_ms, watt_hours, expected_rpm, mean_rpm, mean_watts,
    gallons, gallons_sigma, closed_inputs, active_input, source, expected_source, flags)
  select r.pump_id, $2::uuid, to_timestamp(r.from_at / 1000), to_timestamp(r.to_at / 1000), r.covered_ms, r.watt_hours,
    r.expected_rpm, r.mean_rpm, r.mean_watts, r.gallons, r.gallons_sigma, r.closed_inputs, r.active_input, r.source, r.expected_source, r.flags
  from json_to_recordset($1::json) as r(pump_id uuid, from_at float8, to_at float8, covered_ms bigint, watt_hours float8,
    expected_rpm real, mean_rpm real, mean_watts real, gallons real, gallons_sigma real, closed_inputs int2, active_input int2, source text,
    expected_source text, flags text[])
  on conflict do nothing`;

const STATE = `insert into pump_states (pump_id, company_id, pump_number, cursor, hot, now, high_water, heard_at)
  values ($1, $2, $3, $4, $5, $6, to_timestamp($7::float8 / 1000), to_timestamp($8::float8 / 1000))
  on conflict (pump_id) do update set cursor = excluded.cursor, hot = excluded.hot, now = excluded.now,
    high_water = excluded.high_water, heard_at = excluded.heard_at`;

const LEARNT = `insert into pump_learnt (pump_id, company_id, version, learnt) values ($1, $2, $3, $4)
  on conflict (pump_id) do update set version = excluded.version, learnt = excluded.learnt`;

/** Stores runs and state of a pump as its history left them; the live fold goes on from `cursor`. */
export async function saveHistoryPump(database: Database, history: HistoryPump, cursor: number): Promise<void> {
  const { pumpId, companyId, pumpNumber, context } = history.pump;
  const runs = [...history.runs.values()].map((run) => toRunJson(pumpId, run));
  await database.query(RUNS, [`[${runs.join(',')}]`, companyId]);
  const fold = history.fold.withContext(context);
  const saved = fold.save();
  const hot = encodeHot(saved.hot, { lateAt: [], connection: history.connection() });
  const now = fold.now();
  const values = [
    pumpId,
    companyId,
    pumpNumber,
    cursor,
    hot,
    now === undefined ? null : JSON.stringify(now),
    fold.highWater() ?? null,
    history.heardAt() ?? null,
  ];
  await database.query(STATE, values);
  await database.query(LEARNT, [pumpId, companyId, saved.learntVersion, JSON.stringify(saved.learnt)]);
}
