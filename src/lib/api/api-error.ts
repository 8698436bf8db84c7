import type { ErrorCode } from '#shared/contract/errors.ts';

/** The server's codes, and two that only the browser knows: no answer at all, and an answer that is not of the contract. */
export type ApiErrorCode = ErrorCode | 'unreachable' | 'unreadable';

export type FieldIssue = { readonly path: string; readonly message: string };

/** What every call to the server throws when it does not answer what was asked. */
export class ApiError extends Error {
  readonly code: ApiErrorCode;
  readonly requestId: string | undefined;
  readonly issues: readonly FieldIssue[];
  readonly retryAfterSeconds: number | undefined;

  constructor(
    code: ApiErrorCode,
    message: string,
    more: { requestId?: string; issues?: readonly FieldIssue[]; retryAfterSeconds?: number } = {},
  ) {
    super(message);
    this.name = 'ApiError';
    this.code = code;
    this.requestId = more.requestId;
    this.issues = more.issues ?? [];
    this.retryAfterSeconds = more.retryAfterSeconds;
  }
}

export const isApiError = (error: unknown, ...codes: readonly ApiErrorCode[]): error is ApiError =>
  error instanceof ApiError && (codes.length === 0 || codes.includes(error.code));
