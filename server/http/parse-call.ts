import type { Request } from 'express';
import type { z } from 'zod';
import { type Issue, RequestError } from '#server/errors.ts';
import type { Endpoint } from '#shared/contract/http/endpoint.ts';

type OutputOf<Shape> = Shape extends z.ZodType ? z.output<Shape> : undefined;

/** What an endpoint was called with, in the contract's types. */
export type Call<E extends Endpoint> = {
  readonly params: OutputOf<E['params']>;
  readonly query: OutputOf<E['query']>;
  readonly body: OutputOf<E['body']>;
};

const PARTS = ['params', 'query', 'body'] as const;

/** Reads params, query and body by the endpoint's shapes; a refusal lists every fault of all three. */
export function parseCall<E extends Endpoint>(endpoint: E, request: Request): Call<E> {
  const issues: Issue[] = [];
  const parsed = PARTS.map((part) => {
    const shape = endpoint[part];
    if (shape === undefined) return [part, undefined];
    // No body at all is read as an empty one, so that its fields are named as missing.
    const result = shape.safeParse(request[part] ?? {});
    if (!result.success) issues.push(...result.error.issues.map((issue) => toIssue(part, issue)));
    return [part, result.data];
  });
  if (issues.length > 0) throw new RequestError('validation', 'The request is not valid.', { issues });
  return Object.fromEntries(parsed) as Call<E>;
}

const toIssue = (part: string, { path, message }: z.core.$ZodIssue): Issue => ({
  path: [...(part === 'body' ? [] : [part]), ...path].join('.') || part,
  message,
});
