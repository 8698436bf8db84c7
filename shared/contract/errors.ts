import { z } from 'zod';

/** Stable codes of every refusal, and the HTTP status each one has. */
export const ERROR_STATUS = {
  validation: 400,
  unauthenticated: 401,
  forbidden: 403,
  'not-found': 404,
  conflict: 409,
  'precondition-failed': 412,
  'too-large': 413,
  'precondition-required': 428,
  'rate-limited': 429,
  internal: 500,
  unavailable: 503,
} as const;
export const ERROR_CODES = Object.keys(ERROR_STATUS) as ErrorCode[];
export type ErrorCode = keyof typeof ERROR_STATUS;

/** RFC 9457 problem details. `code` is stable; `issues` lists every invalid field by path. */
export const Problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  detail: z.string().optional(),
  code: z.enum(Object.keys(ERROR_STATUS) as [ErrorCode, ...ErrorCode[]]),
  requestId: z.string(),
  issues: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  retryAfterSeconds: z.number().optional(),
});
export type Problem = z.infer<typeof Problem>;

export const PROBLEM_MEDIA_TYPE = 'application/problem+json';

/** The version of the HTTP interface: sent on every answer, accepted on every request. */
export const API_VERSION = '1';
export const API_VERSION_HEADER = 'API-Version';
