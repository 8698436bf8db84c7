import type { RequestHandler } from 'express';
import type { Logger } from 'pino';
import { requestIdOf } from './request-id.ts';

/** One line a request once it is answered: what, how long, for whom. No query: it may hold a name that was searched. */
export const logAccess =
  (log: Logger): RequestHandler =>
  (request, response, next) => {
    const started = performance.now();
    response.once('close', () => {
      const line = {
        requestId: requestIdOf(response),
        method: request.method,
        path: request.path,
        status: response.statusCode,
        ms: Math.round(performance.now() - started),
        userId: response.locals.userId,
        isCutOff: response.writableFinished ? undefined : true,
      };
      if (response.statusCode >= 500) log.error(line, 'request failed');
      else log.info(line, 'request');
    });
    next();
  };
