import { buildTopic } from '#shared/contract/mqtt/topics.ts';
import type { DeviceMessageKind } from './device-message.ts';
import { shardOfSerial } from './shard-of-serial.ts';

/** A device's own topics, worked out once a connection so that a publish costs one look-up. */
export type DeviceTopics = {
  readonly notice: string;
  /** What a topic is for this device; undefined when it is not its own to publish. */
  readonly kindOf: (topic: string) => DeviceMessageKind | undefined;
};

const PUBLISHED: readonly DeviceMessageKind[] = ['readings', 'status', 'settings'];

/** The topics of the device with this serial. */
export function topicsOfDevice(serial: string): DeviceTopics {
  const shard = shardOfSerial(serial);
  const kinds = new Map(PUBLISHED.map((kind) => [buildTopic({ shard, serial, kind }), kind]));
  return { notice: buildTopic({ shard, serial, kind: 'notice' }), kindOf: (topic) => kinds.get(topic) };
}
