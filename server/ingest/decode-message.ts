import type { DeviceMessage } from '#server/broker/device-message.ts';
import { decodeReadings } from '#shared/contract/mqtt/readings.ts';
import { decodeSettings } from '#shared/contract/mqtt/settings.ts';
import { decodeStatus } from '#shared/contract/mqtt/status.ts';
import { AHEAD_LIMIT_MS } from '#shared/contract/mqtt/wire-limits.ts';
import type { MotorSettings } from '#shared/domain/control/motor-settings.ts';
import type { DeviceStatus } from '#shared/domain/fold/pump-event.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { describeRefusals, type Refusal } from './describe-refusals.ts';
import type { KnownDevice } from './known-device.ts';
import { toStorableText } from './storable-text.ts';

/** What a message said: what is worth storing of it, and what was refused. */
export type DecodedMessage = {
  readonly readings: readonly Reading[];
  /** The readings came as one reading, not as an array. */
  readonly single: boolean;
  readonly status: DeviceStatus | undefined;
  readonly settings: Partial<MotorSettings> | undefined;
  readonly refusal: Refusal | undefined;
};

const NOTHING = { readings: [], single: false, status: undefined, settings: undefined, refusal: undefined };

/** Decodes a message of a device; `notBefore` (ms) is the oldest reading still kept. Never throws. */
export function decodeMessage(message: DeviceMessage, device: KnownDevice, notBefore: number): DecodedMessage {
  const text = message.payload.toString('utf8');
  if (message.kind === 'readings') return decodeReadingsMessage(text, message, device, notBefore);
  return message.kind === 'status' ? decodeStatusMessage(text) : decodeSettingsMessage(text);
}

function decodeReadingsMessage(
  text: string,
  message: DeviceMessage,
  { pump }: KnownDevice,
  notBefore: number,
): DecodedMessage {
  if (pump === undefined) return { ...NOTHING, refusal: describeRefusals([{ reason: 'unassigned' }], text) };
  const limits = { inputCount: pump.inputCount, notAfter: message.receivedAt + AHEAD_LIMIT_MS, notBefore };
  const decoded = decodeReadings(text, limits);
  if (decoded.kind === 'refused') return { ...NOTHING, refusal: describeRefusals([decoded], text) };
  const faults = [...decoded.refused, ...decoded.dropped.map(({ field }) => ({ reason: `field-${field}` }))];
  return {
    ...NOTHING,
    readings: decoded.readings,
    single: decoded.single,
    refusal: faults.length === 0 ? undefined : describeRefusals(faults, text),
  };
}

function decodeStatusMessage(text: string): DecodedMessage {
  const decoded = decodeStatus(text);
  if (decoded.kind === 'refused') return { ...NOTHING, refusal: describeRefusals([decoded], text) };
  const { status } = decoded;
  if (status.state === 'lost') return { ...NOTHING, status };
  return { ...NOTHING, status: { ...status, firmware: toStorableText(status.firmware, 32) } };
}

function decodeSettingsMessage(text: string): DecodedMessage {
  const decoded = decodeSettings(text);
  if (decoded.kind === 'refused') return { ...NOTHING, refusal: describeRefusals([decoded], text) };
  const faults = decoded.faults.map(({ field, reason }) => ({ reason: `${field}-${reason}` }));
  return {
    ...NOTHING,
    settings: decoded.settings,
    refusal: faults.length === 0 ? undefined : describeRefusals(faults, text),
  };
}
