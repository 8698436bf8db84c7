import { z } from 'zod';
import { Instant } from '../primitives.ts';
import { defineEndpoint } from './endpoint.ts';

/** `ok` = everything works; `degraded` = the named part does not, readings may still be taken. */
export const Health = z.object({
  status: z.enum(['ok', 'degraded']),
  version: z.string(),
  serverNow: Instant,
  parts: z.object({
    database: z.enum(['ok', 'down']),
    broker: z.enum(['ok', 'down']),
    mail: z.enum(['ok', 'down', 'unknown']),
    /** Seconds the fold is behind what is stored. */
    foldLagSeconds: z.number().nullable(),
    oldestMailSeconds: z.number().nullable(),
  }),
});
export type Health = z.infer<typeof Health>;

export const healthEndpoints = {
  read: defineEndpoint({
    method: 'GET',
    path: '/api/health',
    summary: 'Whether the watch runs',
    roles: 'public',
    response: Health,
  }),
};
