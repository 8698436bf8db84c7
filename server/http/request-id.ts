import { randomUUID } from 'node:crypto';
import type { RequestHandler, Response } from 'express';

export const REQUEST_ID_HEADER = 'X-Request-Id';

/** What a proxy in front may hand down: short and harmless in a log. */
const ACCEPTABLE = /^[\w-]{8,64}$/;

/** Gives every request an id, its own or the proxy's, and answers it. */
export const giveRequestId: RequestHandler = (request, response, next) => {
  const given = request.get(REQUEST_ID_HEADER);
  const requestId = given !== undefined && ACCEPTABLE.test(given) ? given : randomUUID();
  response.locals.requestId = requestId;
  response.set(REQUEST_ID_HEADER, requestId);
  next();
};

export const requestIdOf = (response: Response): string => String(response.locals.requestId);
