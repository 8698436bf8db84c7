import { encodeSettings } from '#shared/contract/mqtt/settings.ts';
import { encodeStatus } from '#shared/contract/mqtt/status.ts';
import { quoteElement } from './array-literal.ts';
import type { Arrival } from './arrival.ts';

/** One status or settings message as a row. */
type EventRow = {
  readonly place: number;
  readonly companyId: string;
  readonly deviceId: string;
  readonly pumpId: string | undefined;
  readonly kind: 'status' | 'settings';
  readonly receivedAt: number;
  readonly body: string;
};

const literal = (elements: readonly string[]) => `{${elements.join(',')}}`;

/** Status and settings messages of a batch, column by column, in the order of the insert statement. */
export function toEventParameters(rows: readonly EventRow[]): string[] {
  return [
    literal(rows.map((row) => `${row.place}`)),
    literal(rows.map((row) => row.companyId)),
    literal(rows.map((row) => row.deviceId)),
    literal(rows.map((row) => row.pumpId ?? 'NULL')),
    literal(rows.map((row) => row.kind)),
    literal(rows.map((row) => `${row.receivedAt}`)),
    literal(rows.map((row) => quoteElement(row.body))),
  ];
}

/**
 * The event of an arrival as a row; undefined when it has none. It is kept in the wire's own form, without what was
 * refused of it, and read back by the wire's own decoder.
 */
export function findEventRow({ device, receivedAt, decoded }: Arrival, place: number): EventRow | undefined {
  const { companyId, deviceId, pump } = device;
  const whose = { place, companyId, deviceId, pumpId: pump?.id, receivedAt };
  if (decoded.status !== undefined) return { ...whose, kind: 'status', body: encodeStatus(decoded.status) };
  if (decoded.settings !== undefined) return { ...whose, kind: 'settings', body: encodeSettings(decoded.settings) };
  return undefined;
}
