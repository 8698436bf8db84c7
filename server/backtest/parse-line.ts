import { isJsonObject, type JsonObject } from '#shared/contract/mqtt/json-text.ts';
import { readReadings } from '#shared/contract/mqtt/readings.ts';
import { readSettings } from '#shared/contract/mqtt/settings.ts';
import { readStatus } from '#shared/contract/mqtt/status.ts';
import { PAD_STATES, type PadState } from '#shared/domain/control/pump-context.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';

export type ParsedLine =
  | { readonly kind: 'event'; readonly serial: string; readonly event: PumpEvent }
  | { readonly kind: 'fault'; readonly reason: string };

type Line = JsonObject;

const fault = (reason: string): ParsedLine => ({ kind: 'fault', reason });

const isArrival = (value: unknown): value is number =>
  typeof value === 'number' && Number.isSafeInteger(value) && value >= 0;

const isPadState = (value: unknown): value is PadState => PAD_STATES.some((state) => state === value);

const parseJson = (text: string): unknown => {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
};

/**
 * One line of readings.ndjson as an event of a pump's fold, or why it is none. Without `at` a reading's arrival is its
 * own time.
 */
export function parseLine(text: string): ParsedLine {
  const value = parseJson(text);
  if (!isJsonObject(value)) return fault('wants a JSON object');
  if (typeof value.s !== 'string') return fault('wants "s", the serial');
  return value.t === undefined ? parseNews(value.s, value) : parseReading(value.s, value);
}

function parseReading(serial: string, line: Line): ParsedLine {
  const decoded = readReadings(line);
  if (decoded.kind === 'refused') return fault(decoded.reason);
  const reading = decoded.readings[0];
  if (reading === undefined) return fault(decoded.refused[0]?.reason ?? 'no reading');
  if (line.at !== undefined && !isArrival(line.at)) return fault('"at" wants whole milliseconds');
  const receivedAt = isArrival(line.at) ? line.at : reading.at;
  return { kind: 'event', serial, event: { kind: 'reading', reading, receivedAt, single: true } };
}

function parseNews(serial: string, line: Line): ParsedLine {
  const receivedAt = line.at;
  if (!isArrival(receivedAt)) return fault('wants "t" (a reading) or "at" (arrival), whole milliseconds');
  if (line.status !== undefined) {
    const decoded = readStatus(line.status);
    return decoded.kind === 'status'
      ? { kind: 'event', serial, event: { kind: 'status', receivedAt, status: decoded.status } }
      : fault(`status: ${decoded.reason}`);
  }
  if (line.settings !== undefined) {
    const decoded = readSettings(line.settings);
    return decoded.kind === 'settings'
      ? { kind: 'event', serial, event: { kind: 'settings', receivedAt, settings: decoded.settings } }
      : fault(`settings: ${decoded.reason}`);
  }
  if (typeof line.onSite === 'boolean')
    return { kind: 'event', serial, event: { kind: 'on-site', receivedAt, on: line.onSite } };
  if (isPadState(line.state))
    return { kind: 'event', serial, event: { kind: 'pad-state', receivedAt, state: line.state } };
  return fault('wants one of t, status, settings, onSite, state');
}
