import type { StoredMessage } from '#server/ingest/stored-message.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';

/** A stored message as the fold's events, in order. */
export function eventsOfMessage(message: StoredMessage): PumpEvent[] {
  const { receivedAt, single, status, settings } = message;
  const events: PumpEvent[] = message.readings.map((reading) => ({ kind: 'reading', reading, receivedAt, single }));
  if (status !== undefined) events.push({ kind: 'status', receivedAt, status });
  if (settings !== undefined) events.push({ kind: 'settings', receivedAt, settings });
  return events;
}
