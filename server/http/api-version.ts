import type { RequestHandler } from 'express';
import { invalid } from '#server/errors.ts';
import { API_VERSION, API_VERSION_HEADER } from '#shared/contract/errors.ts';

/** Says which version of the interface answers, and refuses a request made for another one. */
export const negotiateVersion: RequestHandler = (request, response, next) => {
  response.set(API_VERSION_HEADER, API_VERSION);
  const asked = request.get(API_VERSION_HEADER);
  if (asked !== undefined && asked !== API_VERSION) {
    throw invalid(API_VERSION_HEADER, `this server speaks version ${API_VERSION}`);
  }
  next();
};
