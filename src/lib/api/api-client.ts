import type { z } from 'zod';
import { API_VERSION, API_VERSION_HEADER } from '#shared/contract/errors.ts';
import type { Endpoint } from '#shared/contract/http/endpoint.ts';
import { ApiError } from './api-error.ts';
import { buildUrl, type QueryValue } from './build-url.ts';
import { readProblem } from './read-problem.ts';
import { renewSession } from './session-renewal.ts';

type ParamsOf<E extends Endpoint> = E extends { params: infer P extends z.ZodType }
  ? { readonly params: z.output<P> & Record<string, string> }
  : { readonly params?: undefined };
type QueryOf<E extends Endpoint> = E extends { query: infer Q extends z.ZodType }
  ? { readonly query?: { readonly [Name in keyof z.output<Q>]?: z.output<Q>[Name] | undefined } }
  : { readonly query?: undefined };
type BodyOf<E extends Endpoint> = E extends { body: infer B extends z.ZodType }
  ? { readonly body: z.input<B> }
  : { readonly body?: undefined };
type VersionOf<E extends Endpoint> = E extends { ifMatch: true }
  ? { readonly version: number }
  : { readonly version?: undefined };

export type CallInput<E extends Endpoint> = ParamsOf<E> &
  QueryOf<E> &
  BodyOf<E> &
  VersionOf<E> & {
    /** The same key for every try of one creation; made here when it is left out. */
    readonly idempotencyKey?: string;
    readonly signal?: AbortSignal;
  };

export type Answer<E extends Endpoint> = z.output<E['response']>;

const TIMEOUT_MS = 20_000;

const buildHeaders = (endpoint: Endpoint, input: CallInput<Endpoint>): Headers => {
  const headers = new Headers({ Accept: 'application/json', [API_VERSION_HEADER]: API_VERSION });
  if (endpoint.body !== undefined) headers.set('Content-Type', 'application/json');
  if (input.version !== undefined) headers.set('If-Match', `"${input.version}"`);
  if (endpoint.idempotent === true) headers.set('Idempotency-Key', input.idempotencyKey ?? crypto.randomUUID());
  return headers;
};

async function send(url: string, init: RequestInit, signal: AbortSignal | undefined): Promise<Response> {
  const timeout = AbortSignal.timeout(TIMEOUT_MS);
  try {
    return await fetch(url, { ...init, signal: signal === undefined ? timeout : AbortSignal.any([signal, timeout]) });
  } catch (error) {
    if (signal?.aborted === true) throw error;
    throw new ApiError('unreachable', 'no answer');
  }
}

async function readAnswer<E extends Endpoint>(endpoint: E, response: Response): Promise<Answer<E>> {
  if (!response.ok) throw await readProblem(response);
  const body: unknown = response.status === 204 ? undefined : await response.json().catch(() => undefined);
  const parsed = endpoint.response.safeParse(body);
  if (!parsed.success) {
    const issues = parsed.error.issues.map(({ path, message }) => ({ path: path.join('.'), message }));
    throw new ApiError('unreadable', `${endpoint.method} ${endpoint.path}`, { issues });
  }
  return parsed.data as Answer<E>;
}

/**
 * Calls one endpoint of the contract and answers what the contract promises; anything else throws an ApiError. A
 * session that has run out is renewed once, silently, and the call is sent again.
 */
export async function call<E extends Endpoint>(endpoint: E, input: CallInput<E>): Promise<Answer<E>> {
  const given: CallInput<Endpoint> = input;
  // An address that the contract does not know leads nowhere: the server need not be asked.
  if (endpoint.params?.safeParse(given.params).success === false) throw new ApiError('not-found', endpoint.path);
  const query: Readonly<Record<string, QueryValue>> = given.query ?? {};
  const url = buildUrl(endpoint.path, given.params ?? {}, query);
  const init: RequestInit = { method: endpoint.method, headers: buildHeaders(endpoint, given) };
  if (given.body !== undefined) init.body = JSON.stringify(given.body);
  const response = await send(url, init, given.signal);
  if (response.status !== 401 || endpoint.roles === 'public') return readAnswer(endpoint, response);
  if (!(await renewSession())) return readAnswer(endpoint, response);
  return readAnswer(endpoint, await send(url, init, given.signal));
}
