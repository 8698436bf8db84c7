import { type Arrival, countRows } from './arrival.ts';
import { createDeviceTouches, type DeviceTouch } from './device-touches.ts';
import { findEventRow, toEventParameters } from './event-columns.ts';
import { createReadingColumns } from './reading-columns.ts';
import { type RefusedRow, toRefusedRow } from './refused-row.ts';
import type { StoredMessage } from './stored-message.ts';

/** The most rows of one batch: beyond it latency grows and throughput does not. Below the block of an arrival number. */
export const MAX_BATCH_ROWS = 1000;

/** Messages that are stored, and then acknowledged, together. */
export type Batch = {
  readonly add: (arrival: Arrival) => void;
  readonly hasRoomFor: (arrival: Arrival) => boolean;
  readonly isEmpty: () => boolean;
  /** Everything the statement needs. */
  readonly toInput: () => BatchInput;
  /** What became rows, once the batch's first sequence is known; `stored` lists the places kept, undefined = all. */
  readonly listStored: (base: number, stored: ReadonlySet<number> | undefined) => StoredMessage[];
  readonly arrivals: readonly Arrival[];
};

export type BatchInput = {
  readonly readingCount: number;
  readonly readings: readonly string[];
  /** Undefined when the batch brings nothing but readings. */
  readonly rest:
    | {
        readonly events: readonly string[];
        readonly touches: readonly DeviceTouch[];
        readonly refused: readonly RefusedRow[];
      }
    | undefined;
};

/** An empty batch. */
export function createBatch(): Batch {
  const arrivals: Arrival[] = [];
  const firstPlaces: number[] = [];
  let places = 0;
  return {
    arrivals,
    isEmpty: () => arrivals.length === 0,
    hasRoomFor: (arrival) => places === 0 || places + countRows(arrival.decoded) <= MAX_BATCH_ROWS,
    add: (arrival) => {
      arrivals.push(arrival);
      firstPlaces.push(places);
      places += countRows(arrival.decoded);
    },
    toInput: () => toInput(arrivals, firstPlaces),
    listStored: (base, stored) =>
      arrivals.flatMap((arrival, index) => toStoredMessage(arrival, base, firstPlaces[index] ?? 0, stored) ?? []),
  };
}

function toInput(arrivals: readonly Arrival[], firstPlaces: readonly number[]): BatchInput {
  const columns = createReadingColumns();
  const touches = createDeviceTouches();
  let readingCount = 0;
  for (const [index, { device, receivedAt, decoded, touchesDevice }] of arrivals.entries()) {
    let place = firstPlaces[index] ?? 0;
    const pumpNumber = device.pump?.number ?? 0;
    for (const reading of decoded.readings) {
      columns.add(reading, place, pumpNumber, receivedAt, decoded.single);
      place += 1;
    }
    readingCount += decoded.readings.length;
    if (touchesDevice) touches.hear(device.deviceId, receivedAt);
    if (decoded.status !== undefined) touches.takeStatus(device.deviceId, receivedAt, decoded.status);
    if (decoded.refusal !== undefined) touches.hear(device.deviceId, receivedAt).refused += decoded.refusal.count;
  }
  const events = arrivals.flatMap((arrival, index) => findEventRow(arrival, firstPlaces[index] ?? 0) ?? []);
  const refused = arrivals.flatMap((arrival) => toRefusedRow(arrival) ?? []);
  const touched = touches.list();
  const isPlain = events.length === 0 && refused.length === 0 && touched.length === 0;
  const rest = isPlain ? undefined : { events: toEventParameters(events), touches: touched, refused };
  return { readingCount, readings: columns.toParameters(), rest };
}

/** A message that left nothing new behind is nothing to the fold. */
function toStoredMessage(
  { device, receivedAt, decoded }: Arrival,
  base: number,
  firstPlace: number,
  stored: ReadonlySet<number> | undefined,
): StoredMessage | undefined {
  const { status, settings, single } = decoded;
  if (device.pump === undefined) return undefined;
  const isEvent = status !== undefined || settings !== undefined;
  const isKept = (index: number) => stored === undefined || stored.has(firstPlace + index);
  const readings = stored === undefined ? decoded.readings : decoded.readings.filter((_, index) => isKept(index));
  if (readings.length === 0 && !isEvent) return undefined;
  const lastIndex = isEvent ? 0 : decoded.readings.findLastIndex((_, index) => isKept(index));
  const sequence = base + firstPlace + lastIndex;
  return { pumpId: device.pump.id, receivedAt, sequence, single, readings, status, settings };
}
