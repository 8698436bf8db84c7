import type { Client, PublishPacket } from 'aedes';
import { ACCEPTED_QOS } from '#shared/contract/mqtt/wire-limits.ts';
import type { ConnectedDevice } from './connected-device.ts';
import type { DeviceMessageKind, ReceiveMessage, Settle } from './device-message.ts';
import type { DeviceRegistry } from './device-registry.ts';
import type { RefusalLog } from './refusal-log.ts';

export type TakePublishOptions = {
  readonly registry: DeviceRegistry;
  readonly receive: ReceiveMessage;
  readonly now: () => number;
  readonly isQuiet: () => boolean;
  readonly sayRefused: RefusalLog;
};

/**
 * The hook that holds a PUBACK back: aedes writes it when the callback is called, and not before. An error closes the
 * connection without one, so that the device sends the message again.
 */
export function createTakePublish(options: TakePublishOptions) {
  return (client: Client | null, packet: PublishPacket, callback: (error?: Error | null) => void): void => {
    const device = client === null ? undefined : options.registry.findByClient(client);
    packet.retain = false;
    // A will that the broker publishes because it is stopping itself says nothing about the device.
    const kind = device === undefined || options.isQuiet() ? undefined : findKind(device, packet, options.sayRefused);
    if (device === undefined || kind === undefined) callback(new Error('not taken'));
    else takeInTurn(options, device, kind, packet, callback);
  };
}

function findKind(
  device: ConnectedDevice,
  packet: PublishPacket,
  sayRefused: RefusalLog,
): DeviceMessageKind | undefined {
  const kind = device.topics.kindOf(packet.topic);
  if (kind !== undefined && ACCEPTED_QOS.includes(packet.qos)) return kind;
  sayRefused(kind === undefined ? 'topic-foreign' : 'qos', {
    serial: device.serial,
    topic: packet.topic.slice(0, 100),
  });
  return undefined;
}

function takeInTurn(
  options: TakePublishOptions,
  device: ConnectedDevice,
  kind: DeviceMessageKind,
  packet: PublishPacket,
  settle: Settle,
): void {
  const { serial } = device;
  const { payload } = packet;
  const message = {
    serial,
    kind,
    payload: typeof payload === 'string' ? Buffer.from(payload) : payload,
    receivedAt: options.now(),
  };
  if (device.queue.run(() => options.receive(message, settle)) === 'accepted') return;
  options.sayRefused('rate', { serial });
  settle(new Error('too many messages'));
}
