import type { Request, Response, Router } from 'express';
import type pg from 'pg';
import type { Logger } from 'pino';
import type { z } from 'zod';
import type { Actor, Context } from '#server/context.ts';
import { asPerson } from '#server/db/transaction.ts';
import { RequestError, unauthenticated } from '#server/errors.ts';
import type { Endpoint } from '#shared/contract/http/endpoint.ts';
import { type ExpectedVersion, readIfMatch } from './etag.ts';
import { doOnce, readRepeatable } from './idempotency.ts';
import { type Call, parseCall } from './parse-call.ts';
import { requestIdOf } from './request-id.ts';
import { sendAnswer } from './send-answer.ts';

type AnswerOf<E extends Endpoint> = z.input<E['response']>;

/** What a person asked for: the contract's types, and the version they had read. */
export type PersonCall<E extends Endpoint> = Call<E> & { readonly ifMatch: ExpectedVersion };

/** A verb of a person, run in a transaction in which they see only what is theirs. */
export type PersonVerb<E extends Endpoint> = (context: Context, call: PersonCall<E>) => Promise<AnswerOf<E>>;

/** Cookies and addresses, for the few endpoints that need no session. */
export type Exchange = {
  readonly request: Request;
  readonly response: Response;
  readonly now: number;
  readonly requestId: string;
};

export type PublicVerb<E extends Endpoint> = (exchange: Exchange, call: Call<E>) => Promise<AnswerOf<E>>;

export type MountServices = {
  readonly router: Router;
  readonly app: pg.Pool;
  readonly log: Logger;
  readonly now: () => number;
  readonly tokenKey: string;
  readonly authenticate: (request: Request) => Promise<Actor | undefined>;
  /** Whether every answer is held against the contract before it leaves: in tests and development. */
  readonly checksAnswers: boolean;
};

export type Mount = {
  readonly person: <E extends Endpoint>(endpoint: E, verb: PersonVerb<E>) => void;
  readonly public: <E extends Endpoint>(endpoint: E, verb: PublicVerb<E>) => void;
};

/** Turns endpoints, which are data, into routes. */
export function createMount(services: MountServices): Mount {
  const { router, checksAnswers, now } = services;
  const on = (endpoint: Endpoint, handle: (request: Request, response: Response) => Promise<void>) => {
    const method = endpoint.method.toLowerCase() as 'get' | 'post' | 'put' | 'patch' | 'delete';
    router[method](endpoint.path, handle);
  };
  return {
    person: (endpoint, verb) =>
      on(endpoint, (request, response) => servePerson(services, endpoint, verb, request, response)),
    public: (endpoint, verb) =>
      on(endpoint, async (request, response) => {
        const call = parseCall(endpoint, request);
        const body = await verb({ request, response, now: now(), requestId: requestIdOf(response) }, call);
        sendAnswer({ endpoint, request, response, checksAnswers }, body);
      }),
  };
}

async function servePerson<E extends Endpoint>(
  services: MountServices,
  endpoint: E,
  verb: PersonVerb<E>,
  request: Request,
  response: Response,
): Promise<void> {
  const actor = await getActor(services, endpoint, request);
  response.locals.userId = actor.userId;
  const call = { ...parseCall(endpoint, request), ifMatch: readIfMatch(request, endpoint.ifMatch === true) };
  const repeatable = endpoint.idempotent === true ? readRepeatable(request) : undefined;
  const { app, log, now, tokenKey, checksAnswers } = services;
  const requestId = requestIdOf(response);
  const { body, isRepeated } = await asPerson(app, actor, endpoint.method === 'GET' ? 'read' : 'write', async (db) => {
    const context = { actor, db, now: now(), log: log.child({ requestId }), requestId, address: request.ip };
    const work = () => verb(context, call);
    if (repeatable === undefined) return { body: await work(), isRepeated: false };
    return doOnce(context, repeatable, { tokenKey, status: endpoint.status ?? 200 }, work);
  });
  if (isRepeated) response.set('Idempotency-Replayed', 'true');
  sendAnswer({ endpoint, request, response, checksAnswers }, body);
}

async function getActor({ authenticate }: MountServices, endpoint: Endpoint, request: Request): Promise<Actor> {
  const actor = await authenticate(request);
  if (actor === undefined) throw unauthenticated();
  if (endpoint.roles !== 'public' && !endpoint.roles.includes(actor.role)) {
    throw new RequestError('forbidden', `This is not for a ${actor.role} to do.`);
  }
  return actor;
}
