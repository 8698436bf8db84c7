import { notFound, RequestError } from '#server/errors.ts';
import { ERROR_STATUS, type ErrorCode, type Problem } from '#shared/contract/errors.ts';

const TITLES: Readonly<Record<ErrorCode, string>> = {
  validation: 'The request is not valid',
  unauthenticated: 'Not signed in',
  forbidden: 'Not allowed',
  'not-found': 'Not found',
  conflict: 'In conflict with what is there',
  'precondition-failed': 'Changed meanwhile',
  'too-large': 'Too large',
  'precondition-required': 'If-Match is missing',
  'rate-limited': 'Too many attempts',
  internal: 'Our fault',
  unavailable: 'Not available now',
};

/** PostgreSQL's classes and codes for a database that is down, full or asked too much, and Node's for no connection. */
const UNAVAILABLE = /^(08|53|57P0|57014|ECONNREFUSED|ECONNRESET|EPIPE|ETIMEDOUT)/;
const POOL_IS_LATE = /timeout exceeded when trying to connect|Connection terminated/;

/** What a thrown thing is for the person: a refusal as it is, anything else without a word about our inside. */
export function toRequestError(error: unknown): RequestError {
  if (error instanceof RequestError) return error;
  const refusal = findBodyError(error) ?? findPathError(error);
  if (refusal !== undefined) return refusal;
  return isUnavailable(error)
    ? new RequestError('unavailable', 'The database does not answer. Try again in a moment.', { retryAfterSeconds: 5 })
    : new RequestError('internal', 'Something went wrong on our side. It was written down under this request id.');
}

export function toProblem(error: RequestError, requestId: string): Problem {
  return {
    type: `urn:millrace:problem:${error.code}`,
    title: TITLES[error.code],
    status: ERROR_STATUS[error.code],
    detail: error.message,
    code: error.code,
    requestId,
    ...(error.issues === undefined ? {} : { issues: [...error.issues] }),
    ...(error.retryAfterSeconds === undefined ? {} : { retryAfterSeconds: error.retryAfterSeconds }),
  };
}

/** What Express's body parser throws. */
function findBodyError(error: unknown): RequestError | undefined {
  const type = typeof error === 'object' && error !== null && 'type' in error ? error.type : undefined;
  if (type === 'entity.too.large') return new RequestError('too-large', 'The body is larger than 256 kB.');
  if (typeof type !== 'string' || !/^(entity|encoding|charset|request|stream)\./.test(type)) return undefined;
  return new RequestError('validation', 'The body cannot be read.', {
    issues: [{ path: 'body', message: 'is not JSON in UTF-8' }],
  });
}

/** What Express and its file server throw for a path: a file that is missing, a `%` that begins no character. */
function findPathError(error: unknown): RequestError | undefined {
  const status = error instanceof Error && 'status' in error ? error.status : undefined;
  if (status === 403 || status === 404) return notFound('page');
  return status === 400 ? new RequestError('validation', 'The address cannot be read.') : undefined;
}

/** Looks through what a query builder wraps around the database's own error. */
function isUnavailable(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  const code = 'code' in error ? String(error.code) : '';
  return UNAVAILABLE.test(code) || POOL_IS_LATE.test(error.message) || isUnavailable(error.cause);
}
