import type pg from 'pg';
import type { BatchInput } from './batch.ts';
import type { DeviceTouch } from './device-touches.ts';
import type { RefusedRow } from './refused-row.ts';

export type StoredBatch = {
  /** Sequence of the batch's first row. */
  readonly base: number;
  /** Places of the readings that were new; undefined = all of them. */
  readonly stored: ReadonlySet<number> | undefined;
};

type Row = { readonly base: number; readonly places: readonly number[] | null };

/*
 * One statement is one transaction: what it stores is committed when it answers. A number of the sequence is a block,
 * rows count up from it by their place in the batch. Times travel as ms in float8, which holds them exactly.
 */
const BASE = `base as materialized (select nextval('arrival_sequence') as base)`;

const READINGS = `stored as (
  insert into readings (at, received_at, sequence, pump_number, rpm, watts, closed_inputs, active_input, flags,
    volts, drive_celsius, ambient_celsius, source, motor_clock, fault)
  select to_timestamp(u.at / 1000), to_timestamp(u.received_at / 1000), base.base + u.place, u.pump_number, u.rpm, u.watts,
    u.closed_inputs, u.active_input, u.flags, u.volts, u.drive, u.ambient, u.source, u.motor_clock, u.fault
  from base, unnest($2::float8[], $3::float8[], $4::int[], $5::int[], $6::real[], $7::real[], $8::int2[], $9::int2[],
    $10::int2[], $11::real[], $12::real[], $13::real[], $14::int2[], $15::int2[], $16::text[])
    as u(at, received_at, place, pump_number, rpm, watts, closed_inputs, active_input, flags, volts, drive, ambient,
      source, motor_clock, fault)
  on conflict do nothing
  returning sequence)`;

const ANSWER = `select base.base::float8 as base,
  case when (select count(*) from stored) < $1::int
    then array(select (stored.sequence - base.base)::int from stored) end as places
from base`;

const EVENTS = `events as (
  insert into device_events (sequence, company_id, device_id, pump_id, kind, received_at, body)
  select base.base + u.place, u.company_id, u.device_id, u.pump_id, u.kind, to_timestamp(u.received_at / 1000), u.body
  from base, unnest($17::int[], $18::uuid[], $19::uuid[], $20::uuid[], $21::text[], $22::float8[], $23::jsonb[])
    as u(place, company_id, device_id, pump_id, kind, received_at, body))`;

const TOUCHES = `touched as (
  update devices d set
    heard_at = greatest(d.heard_at, to_timestamp(t.heard_at / 1000)),
    state = case when t.lost_connection is not null and coalesce(t.connection, d.connection) = t.lost_connection
      then 'lost' else coalesce(t.state, d.state) end,
    connection = coalesce(t.connection, d.connection),
    boot = coalesce(t.boot, d.boot),
    firmware = coalesce(t.firmware, d.firmware),
    refused = d.refused + t.refused
  from json_to_recordset($24::json) as t(device_id uuid, heard_at float8, state text, connection uuid, boot uuid,
    firmware text, lost_connection uuid, refused int)
  where d.id = t.device_id)`;

const REFUSED = `refused as (
  insert into refused_messages (company_id, device_id, received_at, reason, detail, sample)
  select r.company_id, r.device_id, to_timestamp(r.received_at / 1000), r.reason, r.detail, r.sample
  from json_to_recordset($25::json) as r(company_id uuid, device_id uuid, received_at float8, reason text, detail text,
    sample text))`;

const PLAIN = { name: 'store-readings', text: `with ${[BASE, READINGS].join(', ')} ${ANSWER}` };
const FULL = { name: 'store-batch', text: `with ${[BASE, READINGS, EVENTS, TOUCHES, REFUSED].join(', ')} ${ANSWER}` };

/** Stores a batch in one transaction. A reading whose pump and device time are there already changes nothing. */
export async function storeBatch(client: pg.ClientBase, input: BatchInput): Promise<StoredBatch> {
  const { rest } = input;
  const values: unknown[] = [input.readingCount, ...input.readings];
  if (rest !== undefined) values.push(...rest.events, toTouchesJson(rest.touches), toRefusedJson(rest.refused));
  const { rows } = await client.query<Row>({ ...(rest === undefined ? PLAIN : FULL), values });
  const [row] = rows;
  if (row === undefined) throw new Error('storing a batch answered nothing');
  return { base: row.base, stored: row.places === null ? undefined : new Set(row.places) };
}

function toTouchesJson(touches: readonly DeviceTouch[]): string {
  return JSON.stringify(
    touches.map((touch) => ({
      device_id: touch.deviceId,
      heard_at: touch.heardAt,
      state: touch.state,
      connection: touch.connection,
      boot: touch.boot,
      firmware: touch.firmware,
      lost_connection: touch.lostConnection,
      refused: touch.refused,
    })),
  );
}

function toRefusedJson(refused: readonly RefusedRow[]): string {
  return JSON.stringify(
    refused.map((row) => ({
      company_id: row.companyId,
      device_id: row.deviceId,
      received_at: row.receivedAt,
      reason: row.reason,
      detail: row.detail,
      sample: row.sample,
    })),
  );
}
