import type pg from 'pg';
import { READING_COLUMNS, type ReadingRow, SINGLE_FLAG, toReading } from '#server/ingest/reading-row.ts';
import { readSettings } from '#shared/contract/mqtt/settings.ts';
import { readStatus } from '#shared/contract/mqtt/status.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';

/** An event of one pump with its place in the order of arrival. */
export type StoredEvent = { readonly pumpNumber: number; readonly sequence: number; readonly event: PumpEvent };

/** A row of a reading, a status or settings as it was stored. */
export type EventRow = ReadingRow & {
  readonly sequence: number;
  readonly pump_number: number;
  readonly received_at: number;
  readonly kind: 'reading' | 'status' | 'settings';
  readonly body: unknown;
};

const FETCH = 'fetch 5000 from stored_events';

/*
 * A cursor takes no parameters, so the numbers stand in the text; they are numbers and nothing else. Rows lie in the
 * order of their sequence, and its index finds those behind the lowest cursor in a few pages.
 */
const declareCursor = (after: number, pumpNumbers: readonly number[]) => `
declare stored_events no scroll cursor for
with wanted as (select unnest('{${pumpNumbers.map(Number).join(',')}}'::int[]) as number)
select 'reading' as kind, r.sequence::float8 as sequence, r.pump_number,
  date_part('epoch', r.received_at) * 1000 as received_at, ${READING_COLUMNS}, null::jsonb as body
from readings r where r.sequence > ${Number(after)} and r.pump_number in (select number from wanted)
union all
select e.kind, e.sequence::float8, p.number, date_part('epoch', e.received_at) * 1000,
  null, null, null, null, null, null, null, null, null, null, null, null, e.body
from device_events e join pumps p on p.id = e.pump_id
where e.sequence > ${Number(after)} and p.number in (select number from wanted)
order by sequence`;

/**
 * Reads what is stored of some pumps beyond a sequence, in order of arrival, some thousand events at a time. Must run
 * inside a transaction.
 */
export async function* readStoredEvents(
  client: pg.ClientBase,
  after: number,
  pumpNumbers: readonly number[],
): AsyncGenerator<readonly StoredEvent[]> {
  await client.query(declareCursor(after, pumpNumbers));
  for (;;) {
    const { rows } = await client.query<EventRow>(FETCH);
    if (rows.length === 0) break;
    yield rows.flatMap((row) => toStoredEvent(row) ?? []);
  }
  await client.query('close stored_events');
}

/** An event that the wire's decoder does not read any more is passed over: it was read once, when it came. */
export function toStoredEvent(row: EventRow): StoredEvent | undefined {
  const event = toPumpEvent(row);
  return event && { pumpNumber: row.pump_number, sequence: row.sequence, event };
}

function toPumpEvent(row: EventRow): PumpEvent | undefined {
  const receivedAt = Math.round(row.received_at);
  if (row.kind === 'reading') {
    return { kind: 'reading', reading: toReading(row), receivedAt, single: (row.flags & SINGLE_FLAG) !== 0 };
  }
  if (row.kind === 'status') {
    const decoded = readStatus(row.body);
    return decoded.kind === 'status' ? { kind: 'status', receivedAt, status: decoded.status } : undefined;
  }
  const decoded = readSettings(row.body);
  return decoded.kind === 'settings' ? { kind: 'settings', receivedAt, settings: decoded.settings } : undefined;
}
