import type { DeviceStatus } from '#shared/domain/fold/pump-event.ts';
import { isJsonObject, type JsonObject, parseJsonText, shortText } from './json-text.ts';

export type { DeviceStatus };

/** Why a whole status message is refused, by the wire's own field names. */
export type StatusRefusal =
  | 'not-json'
  | 'not-an-object'
  | 'state-unknown'
  | 'conn-invalid'
  | 'boot-invalid'
  | 'up-invalid'
  | 'fw-invalid';

export type DecodedStatus =
  | { readonly kind: 'status'; readonly status: DeviceStatus }
  | { readonly kind: 'refused'; readonly reason: StatusRefusal };

const UUID_PATTERN = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i;

/**
 * Decodes a status message. Every field of its state is required; an unknown field is ignored.
 *
 * @example decodeStatus('{"state":"asleep"}') // { kind: 'refused', reason: 'state-unknown' }
 */
export function decodeStatus(text: string): DecodedStatus {
  return readStatus(parseJsonText(text));
}

/** The same as `decodeStatus`, from a value that is parsed already. */
export function readStatus(value: unknown): DecodedStatus {
  if (value === undefined) return refuse('not-json');
  if (!isJsonObject(value)) return refuse('not-an-object');
  const connection = uuid(value.conn);
  if (value.state !== 'online' && value.state !== 'lost') return refuse('state-unknown');
  if (connection === undefined) return refuse('conn-invalid');
  if (value.state === 'lost') return { kind: 'status', status: { state: 'lost', connection } };
  return readOnline(value, connection);
}

function readOnline(fields: JsonObject, connection: string): DecodedStatus {
  const boot = uuid(fields.boot);
  const firmware = shortText(fields.fw, 32);
  const upSeconds = fields.up;
  if (boot === undefined) return refuse('boot-invalid');
  if (typeof upSeconds !== 'number' || !Number.isFinite(upSeconds) || upSeconds < 0) return refuse('up-invalid');
  if (firmware === undefined) return refuse('fw-invalid');
  return { kind: 'status', status: { state: 'online', connection, boot, upSeconds, firmware } };
}

/** Writes a status message. */
export function encodeStatus(status: DeviceStatus): string {
  if (status.state === 'lost') return JSON.stringify({ state: 'lost', conn: status.connection });
  return JSON.stringify({
    state: 'online',
    conn: status.connection,
    boot: status.boot,
    up: status.upSeconds,
    fw: status.firmware,
  });
}

function uuid(value: unknown): string | undefined {
  return typeof value === 'string' && UUID_PATTERN.test(value) ? value.toLowerCase() : undefined;
}

function refuse(reason: StatusRefusal): DecodedStatus {
  return { kind: 'refused', reason };
}
