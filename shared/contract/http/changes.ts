import { z } from 'zod';
import { Id, Instant } from '../primitives.ts';
import { Alarm } from './alarms.ts';
import { defineEndpoint, EVERYONE } from './endpoint.ts';
import { PumpLive } from './pumps.ts';
import { Run } from './runs.ts';

/** Position in the stream of changes; opaque, grows. */
export const ChangeCursor = z.string().regex(/^\d{1,20}$/);

/**
 * Everything the person may see that changed at or after `since`. `complete` false = too much to list: read the
 * screens again from the beginning.
 */
export const Changes = z.object({
  cursor: ChangeCursor,
  complete: z.boolean(),
  pumps: z.array(PumpLive),
  runs: z.array(z.object({ pumpId: Id, run: Run })),
  alarms: z.array(Alarm),
  serverNow: Instant,
});
export type Changes = z.infer<typeof Changes>;

export const changeEndpoints = {
  list: defineEndpoint({
    method: 'GET',
    path: '/api/changes',
    summary: 'What changed since a cursor, after a break of the live connection',
    roles: EVERYONE,
    query: z.object({ since: ChangeCursor }),
    response: Changes,
  }),
};
