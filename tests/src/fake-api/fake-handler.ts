import type { z } from 'zod';
import { ERROR_STATUS, type ErrorCode } from '#shared/contract/errors.ts';
import type { Endpoint } from '#shared/contract/http/endpoint.ts';
import type { FakeState } from './fake-state.ts';

/** What comes with a call, as its endpoint says. */
export type Input<E extends Endpoint> = {
  readonly params: E extends { params: infer P extends z.ZodType } ? z.output<P> : Record<string, never>;
  readonly query: E extends { query: infer Q extends z.ZodType } ? z.output<Q> : Record<string, never>;
  readonly body: E extends { body: infer B extends z.ZodType } ? z.output<B> : undefined;
  /** The version of If-Match. */
  readonly ifMatch: number | undefined;
};

export class FakeRefusal extends Error {
  readonly code: ErrorCode;
  constructor(code: ErrorCode) {
    super(`${ERROR_STATUS[code]} ${code}`);
    this.code = code;
  }
}

export type FakeHandler = { readonly endpoint: Endpoint; readonly answer: (state: FakeState, input: never) => unknown };

/** Ties an answer to its endpoint: what does not fit the contract does not compile. */
export const handle = <E extends Endpoint>(
  endpoint: E,
  answer: (state: FakeState, input: Input<E>) => z.input<E['response']>,
): FakeHandler => ({ endpoint, answer });
