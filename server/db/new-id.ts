import { randomBytes } from 'node:crypto';

/**
 * A UUID of version 7 (RFC 9562, 5.7): 48 bits of milliseconds and 74 random ones, so that rows made one after
 * another lie side by side in their index.
 */
export function newId(now = Date.now()): string {
  const bytes = randomBytes(16);
  bytes.writeUIntBE(now, 0, 6);
  bytes.writeUInt8(0x70 | (bytes.readUInt8(6) & 0x0f), 6);
  bytes.writeUInt8(0x80 | (bytes.readUInt8(8) & 0x3f), 8);
  return bytes.toString('hex').replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, '$1-$2-$3-$4-$5');
}
