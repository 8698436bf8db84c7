import type { Request, Response } from 'express';
import type { Endpoint } from '#shared/contract/http/endpoint.ts';
import { etagOf, tellsTime } from './etag.ts';

type Answering = {
  readonly endpoint: Endpoint;
  readonly request: Request;
  readonly response: Response;
  readonly checksAnswers: boolean;
};

/** Sends what a verb answered: with its tag, or 304 where the client has it already. */
export function sendAnswer({ endpoint, request, response, checksAnswers }: Answering, body: unknown): void {
  const { method, status = 200, response: shape, path } = endpoint;
  if (checksAnswers) {
    const check = shape.safeParse(body);
    if (!check.success) throw new Error(`${method} ${path} broke its contract: ${check.error.message}`);
  }
  if (status === 204) {
    response.status(204).end();
    return;
  }
  const written = JSON.stringify(body) ?? '';
  response.status(status).set('ETag', etagOf(written, body)).vary('Cookie');
  // An answer that tells the time may not come out of a cache; others are asked for again and mostly unchanged.
  response.set('Cache-Control', method !== 'GET' || tellsTime(body) ? 'no-store' : 'private, no-cache');
  if (method === 'GET' && isFresh(request, response)) {
    response.status(304).end();
    return;
  }
  response.type('json').send(written);
}

/** If-None-Match by weak comparison (RFC 9110, 13.1.2). */
function isFresh(request: Request, response: Response): boolean {
  const tags =
    request
      .get('If-None-Match')
      ?.split(',')
      .map((tag) => tag.trim()) ?? [];
  return tags.includes(response.get('ETag') ?? '') || tags.includes('*');
}
