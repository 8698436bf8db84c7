import compression from 'compression';
import express, { type Express, json, type Request, type RequestHandler, Router } from 'express';
import type { Logger } from 'pino';
import { EVERY_ENDPOINT } from '#shared/contract/http/every-endpoint.ts';
import type { Actor } from './context.ts';
import { notFound, unauthenticated } from './errors.ts';
import { logAccess } from './http/access-log.ts';
import { negotiateVersion } from './http/api-version.ts';
import { answerErrors } from './http/error-response.ts';
import { describeInterface } from './http/openapi.ts';
import { giveRequestId } from './http/request-id.ts';
import { refuseOtherSites } from './http/same-origin.ts';
import { setSecurityHeaders } from './http/security-headers.ts';
import { serveClient } from './http/static-client.ts';

/** Half the time of the usual level for a twentieth more bytes. */
const COMPRESSION_LEVEL = 4;

export type AppServices = {
  readonly log: Logger;
  readonly publicUrl: string;
  readonly trustedProxies: number;
  /** Where the built client lies. */
  readonly clientFolder: string;
  readonly authenticate: (request: Request) => Promise<Actor | undefined>;
  /** Adds every route of the contract. */
  readonly mountRoutes: (router: Router) => void;
};

const LARGEST_BODY = '256kb';

/** The HTTP side as a whole, without listening: middleware, the routes of the contract, the built client. */
export function createApp({
  log,
  publicUrl,
  trustedProxies,
  clientFolder,
  authenticate,
  mountRoutes,
}: AppServices): Express {
  const app = express();
  app.disable('x-powered-by').set('trust proxy', trustedProxies).set('query parser', 'simple').set('etag', false);
  app.use(giveRequestId, logAccess(log), setSecurityHeaders(publicUrl), compression({ level: COMPRESSION_LEVEL }));
  app.use('/api', negotiateVersion, refuseOtherSites(publicUrl), json({ limit: LARGEST_BODY }));
  const description = JSON.stringify(describeInterface(EVERY_ENDPOINT));
  app.get('/api/openapi.json', (_request, response) => void response.type('json').send(description));
  const router = Router();
  mountRoutes(router);
  app.use(router);
  app.use('/api', refuseUnknownPath(authenticate));
  app.use(serveClient(clientFolder));
  app.use(answerErrors(log));
  return app;
}

/** Below /api nothing is served that the contract does not name, and a stranger does not learn what it names. */
const refuseUnknownPath =
  (authenticate: AppServices['authenticate']): RequestHandler =>
  async (request) => {
    throw (await authenticate(request)) === undefined ? unauthenticated() : notFound('endpoint');
  };
