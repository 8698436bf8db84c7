/** A device's serial is its MQTT client id and its user name. */
export const SERIAL_PATTERN = /^[A-Z0-9][A-Z0-9-]{5,31}$/;

export const TOPIC_KINDS = ['readings', 'status', 'settings', 'notice'] as const;
export type TopicKind = (typeof TOPIC_KINDS)[number];

export type DeviceTopic = { readonly shard: number; readonly serial: string; readonly kind: TopicKind };

const TOPIC_PATTERN = /^millrace\/v1\/([0-3][0-9a-f])\/([A-Z0-9][A-Z0-9-]{5,31})\/(readings|status|settings|notice)$/;

/**
 * The shard of a device, 0 to 63, from the first byte of the SHA-256 digest of its serial. The caller computes the
 * digest: this folder runs in a browser too.
 *
 * @example shardFromDigestByte(0xff) // 63
 */
export function shardFromDigestByte(byte: number): number {
  return byte & 0x3f;
}

/**
 * Writes a device's topic; the shard is two lower-case hex digits.
 *
 * @example buildTopic({ shard: 10, serial: 'MR-000123', kind: 'readings' }) // 'millrace/v1/0a/MR-000123/readings'
 */
export function buildTopic(topic: DeviceTopic): string {
  return `millrace/v1/${topic.shard.toString(16).padStart(2, '0')}/${topic.serial}/${topic.kind}`;
}

/**
 * Reads a device's topic; undefined for anything else, wildcards and upper-case shards included. The caller still
 * has to compare shard and serial with those of the device that is connected.
 *
 * @example parseTopic('millrace/v1/0a/MR-000123/status') // { shard: 10, serial: 'MR-000123', kind: 'status' }
 */
export function parseTopic(topic: string): DeviceTopic | undefined {
  const parts = TOPIC_PATTERN.exec(topic);
  if (parts === null) return undefined;
  const [, shard = '', serial = '', name = ''] = parts;
  const kind = TOPIC_KINDS.find((candidate) => candidate === name);
  return kind === undefined ? undefined : { shard: Number.parseInt(shard, 16), serial, kind };
}

/** Whether a text can be a device's serial. */
export function isSerial(text: string): boolean {
  return SERIAL_PATTERN.test(text);
}
