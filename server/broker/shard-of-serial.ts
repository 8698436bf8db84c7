import { createHash } from 'node:crypto';
import { shardFromDigestByte } from '#shared/contract/mqtt/topics.ts';

/**
 * The shard of a device's topics, 0 to 63: the first byte of SHA-256 of its serial, AND 0x3f.
 *
 * @example shardOfSerial('MR-000123') // 0 to 63, always the same
 */
export function shardOfSerial(serial: string): number {
  return shardFromDigestByte(createHash('sha256').update(serial).digest().readUInt8(0));
}
