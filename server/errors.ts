import type { ErrorCode } from '#shared/contract/errors.ts';

export type Issue = { readonly path: string; readonly message: string };

type More = {
  readonly issues?: readonly Issue[];
  readonly retryAfterSeconds?: number;
};

/** A refusal with a stable code: what the person may read. Everything else that is thrown is a fault of ours. */
export class RequestError extends Error {
  readonly code: ErrorCode;
  readonly issues: readonly Issue[] | undefined;
  readonly retryAfterSeconds: number | undefined;

  constructor(code: ErrorCode, detail: string, { issues, retryAfterSeconds }: More = {}) {
    super(detail);
    this.name = 'RequestError';
    this.code = code;
    this.issues = issues;
    this.retryAfterSeconds = retryAfterSeconds;
  }
}

/** Another company's thing is not found either: that it exists is nobody else's business. */
export const notFound = (what: string) =>
  new RequestError('not-found', `There is no such ${what}, or it is not yours to see.`);

export const conflict = (detail: string) => new RequestError('conflict', detail);

export const invalid = (path: string, message: string) =>
  new RequestError('validation', 'The request is not valid.', { issues: [{ path, message }] });

export const unauthenticated = (detail = 'Sign in first.') => new RequestError('unauthenticated', detail);
