import type pg from 'pg';
import { type EventRow, type StoredEvent, toStoredEvent } from '#server/fold/stored-events-repository.ts';
import { READING_COLUMNS } from '#server/ingest/reading-row.ts';

const FETCH = 'fetch 5000 from pump_events';

/* A cursor takes no parameters: what stands in the text are numbers and an id of our own. */
const declareCursor = (pumpNumber: number, from: number, to: number) => `
declare pump_events no scroll cursor for
select 'reading' as kind, r.sequence::float8 as sequence, r.pump_number,
  date_part('epoch', r.received_at) * 1000 as received_at, ${READING_COLUMNS}, null::jsonb as body
from readings r where r.pump_number = ${Number(pumpNumber)}
  and r.at >= to_timestamp(${Number(from)}::float8 / 1000) and r.at < to_timestamp(${Number(to)}::float8 / 1000)
union all
select e.kind, e.sequence::float8, p.number, date_part('epoch', e.received_at) * 1000,
  null, null, null, null, null, null, null, null, null, null, null, null, e.body
from device_events e join pumps p on p.id = e.pump_id
where p.number = ${Number(pumpNumber)}
  and e.received_at >= to_timestamp(${Number(from)}::float8 / 1000) and e.received_at < to_timestamp(${Number(to)}::float8 / 1000)
order by sequence`;

/** What is stored of one pump between two instants (ms), in order of arrival, some thousand at a time. Inside a transaction. */
export async function* readPumpEvents(
  client: pg.ClientBase,
  pumpNumber: number,
  range: { readonly from: number; readonly to: number },
): AsyncGenerator<readonly StoredEvent[]> {
  await client.query(declareCursor(pumpNumber, range.from, range.to));
  for (;;) {
    const { rows } = await client.query<EventRow>(FETCH);
    if (rows.length === 0) break;
    yield rows.flatMap((row) => toStoredEvent(row) ?? []);
  }
  await client.query('close pump_events');
}
