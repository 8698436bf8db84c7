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

/** The event of an arrival as a row; undefined when it has none. */
export function findEventRow({ device, receivedAt, decoded }: Arrival, place: number): EventRow | undefined {
  const { status, settings } = decoded;
  if (status === undefined && settings === undefined) return undefined;
  const { companyId, deviceId, pump } = device;
  const kind = status === undefined ? 'settings' : 'status';
  return { place, companyId, deviceId, pumpId: pump?.id, kind, receivedAt, body: JSON.stringify(status ?? settings) };
}
