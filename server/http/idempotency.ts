import { createHash } from 'node:crypto';
import type { Request } from 'express';
import type { Context } from '#server/context.ts';
import { conflict, invalid } from '#server/errors.ts';
import { findAnswer, keepAnswer, takeKey } from './idempotency-repository.ts';
import { openAnswer, sealAnswer } from './sealed-answer.ts';

/** Sent by a client that may repeat a creation, for instance because the answer was lost. */
export const IDEMPOTENCY_KEY_HEADER = 'Idempotency-Key';

const ACCEPTABLE = /^[\x21-\x7e]{8,200}$/;

export type RepeatableRequest = { readonly key: string; readonly hash: Buffer };

/** Reads the key and what it stands for; undefined where the client sent none. */
export function readRepeatable(request: Request): RepeatableRequest | undefined {
  const key = request.get(IDEMPOTENCY_KEY_HEADER);
  if (key === undefined) return undefined;
  if (!ACCEPTABLE.test(key)) throw invalid(IDEMPOTENCY_KEY_HEADER, 'takes 8 to 200 visible ASCII characters');
  const text = JSON.stringify([request.method, request.path, request.body ?? null]);
  return { key, hash: createHash('sha256').update(text).digest() };
}

/**
 * Does the work once for a key: the key and the answer are written in the transaction of the work itself, so both are
 * there or neither. A repetition gets the first answer; the same key for another request is refused.
 */
export async function doOnce(
  { actor: { companyId, userId }, db }: Context,
  { key, hash }: RepeatableRequest,
  { tokenKey, status }: { readonly tokenKey: string; readonly status: number },
  work: () => Promise<unknown>,
): Promise<{ readonly body: unknown; readonly isRepeated: boolean }> {
  const owner = { companyId, userId, key };
  const keys = { tokenKey, userId, idempotencyKey: key };
  if (await takeKey(db, owner, hash)) {
    const body = await work();
    await keepAnswer(db, owner, { status, sealed: sealAnswer(body, keys) });
    return { body, isRepeated: false };
  }
  const before = await findAnswer(db, owner);
  if (before === undefined || before.sealedAnswer === null)
    throw conflict('The first request with this key is not finished. Try again.');
  if (!before.requestHash.equals(hash))
    throw conflict('This Idempotency-Key was used for another request. Take a new one.');
  return { body: openAnswer(before.sealedAnswer, keys), isRepeated: true };
}
