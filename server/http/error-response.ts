import type { ErrorRequestHandler, Response } from 'express';
import type { Logger } from 'pino';
import type { RequestError } from '#server/errors.ts';
import { ERROR_STATUS, PROBLEM_MEDIA_TYPE } from '#shared/contract/errors.ts';
import { toProblem, toRequestError } from './problem.ts';
import { requestIdOf } from './request-id.ts';

/** The one place where what was thrown becomes an answer (RFC 9457). */
export const answerErrors =
  (log: Logger): ErrorRequestHandler =>
  (error, _request, response, next) => {
    const refusal = toRequestError(error);
    if (ERROR_STATUS[refusal.code] >= 500)
      log.error({ err: error, requestId: requestIdOf(response) }, 'unexpected error');
    if (response.headersSent) return next(error);
    sendProblem(response, refusal);
  };

function sendProblem(response: Response, refusal: RequestError): void {
  const { retryAfterSeconds, code } = refusal;
  if (retryAfterSeconds !== undefined) response.set('Retry-After', String(Math.ceil(retryAfterSeconds)));
  response
    .status(ERROR_STATUS[code])
    .set('Cache-Control', 'no-store')
    .type(PROBLEM_MEDIA_TYPE)
    .send(JSON.stringify(toProblem(refusal, requestIdOf(response))));
}
