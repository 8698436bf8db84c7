import type pg from 'pg';
import type { Run } from '#shared/domain/runs/run.ts';
import type { FoldWrite } from './fold-write.ts';

/*
 * One statement, so that it can be a transaction by itself where no alarm is touched. Runs and learnt state of a pump
 * are written only where its state row was, which is only where the epoch is still ours.
 */
const WRITE = `with given as (
  select * from json_to_recordset($2::json) as g(pump_id uuid, cursor bigint, hot jsonb, now jsonb, high_water float8,
    heard_at float8, silent_since float8, lost_at float8)),
written as (
  update pump_states s set cursor = coalesce(g.cursor, s.cursor), hot = coalesce(g.hot, s.hot), now = g.now,
    high_water = to_timestamp(g.high_water / 1000), heard_at = to_timestamp(g.heard_at / 1000),
    silent_since = to_timestamp(g.silent_since / 1000), lost_at = to_timestamp(g.lost_at / 1000),
    quarantined_at = null, quarantine_reason = null
  from given g where s.pump_id = g.pump_id and s.epoch = $1
  returning s.pump_id, s.company_id),
ran as (
  insert into runs (pump_id, company_id, from_at, to_at, covered_ms, watt_hours, expected_rpm, mean_rpm, mean_watts,
    gallons, gallons_sigma, closed_inputs, active_input, source, expected_source, flags)
  select r.pump_id, w.company_id, to_timestamp(r.from_at / 1000), to_timestamp(r.to_at / 1000), r.covered_ms, r.watt_hours,
    r.expected_rpm, r.mean_rpm, r.mean_watts, r.gallons, r.gallons_sigma, r.closed_inputs, r.active_input, r.source, r.expected_source, r.flags
  from json_to_recordset($3::json) as r(pump_id uuid, from_at float8, to_at float8, covered_ms bigint, watt_hours float8,
    expected_rpm real, mean_rpm real, mean_watts real, gallons real, gallons_sigma real, closed_inputs int2, active_input int2, source text,
    expected_source text, flags text[])
  join written w on w.pump_id = r.pump_id
  on conflict (pump_id, from_at) do update set to_at = excluded.to_at, covered_ms = excluded.covered_ms,
    watt_hours = excluded.watt_hours, expected_rpm = excluded.expected_rpm, mean_rpm = excluded.mean_rpm,
    mean_watts = excluded.mean_watts, gallons = excluded.gallons, gallons_sigma = excluded.gallons_sigma,
    closed_inputs = excluded.closed_inputs,
    active_input = excluded.active_input, source = excluded.source, expected_source = excluded.expected_source,
    flags = excluded.flags),
learnt as (
  insert into pump_learnt (pump_id, company_id, version, learnt)
  select l.pump_id, w.company_id, l.version, l.learnt
  from json_to_recordset($4::json) as l(pump_id uuid, version int, learnt jsonb)
  join written w on w.pump_id = l.pump_id
  on conflict (pump_id) do update set version = excluded.version, learnt = excluded.learnt, updated_at = now())
select pump_id from written`;

/** Writes states, runs and what was learnt of some pumps; answers the pumps that are still ours, the only ones written. */
export async function writeFold(
  client: Pick<pg.ClientBase, 'query'>,
  epoch: number,
  writes: readonly FoldWrite[],
): Promise<Set<string>> {
  const states = writes.map(stateJson);
  const runs = writes.flatMap(({ slot, runs: runsOfPump }) =>
    runsOfPump.map((run) => toRunJson(slot.pump.pumpId, run)),
  );
  const learnt = writes.flatMap(learntJson);
  const { rows } = await client.query<{ pump_id: string }>({
    name: 'write-fold',
    text: WRITE,
    values: [epoch, `[${states.join(',')}]`, `[${runs.join(',')}]`, `[${learnt.join(',')}]`],
  });
  return new Set(rows.map(({ pump_id }) => pump_id));
}

function stateJson({ slot, state, now, highWater, heardAt, silentSince, lostAt }: FoldWrite): string {
  const plain = JSON.stringify({
    pump_id: slot.pump.pumpId,
    cursor: state?.cursor,
    now,
    high_water: highWater,
    heard_at: heardAt,
    silent_since: silentSince,
    lost_at: lostAt,
  });
  return state === undefined ? plain : `${plain.slice(0, -1)},"hot":${state.hot}}`;
}

function learntJson({ slot, state }: FoldWrite): string[] {
  if (state?.learnt === undefined) return [];
  return [`{"pump_id":"${slot.pump.pumpId}","version":${state.learnt.version},"learnt":${state.learnt.json}}`];
}

/** A run as JSON text with the columns' names. */
export function toRunJson(pumpId: string, run: Run): string {
  return JSON.stringify({
    pump_id: pumpId,
    from_at: run.from,
    to_at: run.to,
    covered_ms: Math.round(run.coveredMs),
    watt_hours: run.wattHours,
    expected_rpm: run.expectedRpm,
    mean_rpm: run.meanRpm,
    mean_watts: run.meanWatts,
    gallons: run.gallons,
    gallons_sigma: run.gallonsSigma,
    closed_inputs: run.closedInputs,
    active_input: run.activeInput,
    source: run.source,
    expected_source: run.expectedSource,
    flags: run.flags,
  });
}

/** Says of a pump of ours that a detector threw, and which. Its cursor stays where it is. */
export async function setAside(
  client: Pick<pg.ClientBase, 'query'>,
  epoch: number,
  pumpId: string,
  reason: string,
): Promise<void> {
  await client.query(
    `update pump_states set quarantined_at = now(), quarantine_reason = $3 where pump_id = $1 and epoch = $2`,
    [pumpId, epoch, reason.slice(0, 500)],
  );
}

/** Moves the cursors of pumps of ours, of which nothing is stored below it, up to a sequence. */
export async function advanceCursors(
  client: Pick<pg.ClientBase, 'query'>,
  epoch: number,
  pumpIds: readonly string[],
  sequence: number,
): Promise<void> {
  await client.query(
    'update pump_states set cursor = $3 where epoch = $1 and pump_id = any($2::uuid[]) and cursor < $3',
    [epoch, pumpIds, sequence],
  );
}

/** Which of these pumps have any reading or event at all. */
export async function listPumpsWithEvents(
  client: Pick<pg.ClientBase, 'query'>,
  pumpIds: readonly string[],
): Promise<Set<string>> {
  const { rows } = await client.query<{ id: string }>(
    `select p.id from pumps p where p.id = any($1::uuid[]) and (
       exists (select from readings r where r.pump_number = p.number)
       or exists (select from device_events e where e.pump_id = p.id))`,
    [pumpIds],
  );
  return new Set(rows.map(({ id }) => id));
}

/** A number of the arrival sequence: everything stored later than this has a higher one. */
export async function takeArrivalNumber(client: Pick<pg.ClientBase, 'query'>): Promise<number> {
  const { rows } = await client.query<{ next: number }>(`select nextval('arrival_sequence')::float8 as next`);
  return rows[0]?.next ?? 0;
}
