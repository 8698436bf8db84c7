import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { type RequestHandler, Router, static as serveFiles } from 'express';

const YEAR_SECONDS = 31_536_000;

/**
 * The built client. Files below assets/ bear a digest in their name and may be kept for ever; every other path that
 * is no file is a screen, which the client itself finds.
 */
export function serveClient(folder: string): Router {
  const router = Router();
  const page = join(folder, 'index.html');
  const assets = { immutable: true, maxAge: YEAR_SECONDS * 1000, index: false, fallthrough: false } as const;
  router.use('/assets', serveFiles(join(folder, 'assets'), assets));
  router.use(serveFiles(folder, { index: false, maxAge: 0, dotfiles: 'ignore' }));
  router.get('/{*screen}', sendPage(page));
  return router;
}

const sendPage =
  (page: string): RequestHandler =>
  (_request, response, next) => {
    response.set('Cache-Control', 'no-cache');
    if (existsSync(page)) return response.sendFile(page, next);
    response.status(503).type('text').send('The client is not built. Type: npm run build\n');
  };
