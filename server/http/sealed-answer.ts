import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from 'node:crypto';

const NONCE_BYTES = 12;
const TAG_BYTES = 16;

/** A key of its own for every request that may be repeated: HKDF-SHA256 (RFC 5869) over what only its sender knows. */
const keyFor = (tokenKey: string, userId: string, idempotencyKey: string): Buffer =>
  Buffer.from(hkdfSync('sha256', tokenKey, userId, `millrace repeated answer ${idempotencyKey}`, 32));

export type SealingKeys = { readonly tokenKey: string; readonly userId: string; readonly idempotencyKey: string };

/** Encrypts an answer (AES-256-GCM): nonce, tag, text. */
export function sealAnswer(answer: unknown, { tokenKey, userId, idempotencyKey }: SealingKeys): Buffer {
  const nonce = randomBytes(NONCE_BYTES);
  const cipher = createCipheriv('aes-256-gcm', keyFor(tokenKey, userId, idempotencyKey), nonce);
  const text = Buffer.concat([cipher.update(JSON.stringify(answer)), cipher.final()]);
  return Buffer.concat([nonce, cipher.getAuthTag(), text]);
}

/** Opens what `sealAnswer` made; throws where the key is another one or a byte was changed. */
export function openAnswer(sealed: Buffer, { tokenKey, userId, idempotencyKey }: SealingKeys): unknown {
  const decipher = createDecipheriv(
    'aes-256-gcm',
    keyFor(tokenKey, userId, idempotencyKey),
    sealed.subarray(0, NONCE_BYTES),
  );
  decipher.setAuthTag(sealed.subarray(NONCE_BYTES, NONCE_BYTES + TAG_BYTES));
  const text = Buffer.concat([decipher.update(sealed.subarray(NONCE_BYTES + TAG_BYTES)), decipher.final()]);
  return JSON.parse(text.toString());
}
