import { z } from 'zod';
import { Alarm } from '../http/alarms.ts';
import { ChangeCursor } from '../http/changes.ts';
import { PumpLive } from '../http/pumps.ts';
import { Run } from '../http/runs.ts';
import { Id, Instant } from '../primitives.ts';

export const LIVE_PATH = '/api/live';

/**
 * Server to browser. Every frame that carries news carries the cursor that is complete after it.
 * `hello` first; `heartbeat` every 10 s; `resync` = frames were dropped, ask GET /api/changes.
 */
export const ServerFrame = z.discriminatedUnion('type', [
  z.object({ type: z.literal('hello'), serverNow: Instant, cursor: ChangeCursor }),
  z.object({ type: z.literal('heartbeat'), serverNow: Instant, cursor: ChangeCursor }),
  z.object({
    type: z.literal('news'),
    cursor: ChangeCursor,
    pumps: z.array(PumpLive),
    runs: z.array(z.object({ pumpId: Id, run: Run })),
    alarms: z.array(Alarm),
  }),
  z.object({ type: z.literal('resync'), reason: z.enum(['slow', 'too-much', 'restart']) }),
]);
export type ServerFrame = z.infer<typeof ServerFrame>;

/** Browser to server. `watch` replaces what is watched: pumps on screen (their runs and every reading), alarms always. */
export const ClientFrame = z.discriminatedUnion('type', [
  z.object({ type: z.literal('watch'), pumps: z.array(Id).max(500) }),
  z.object({ type: z.literal('heartbeat') }),
]);
export type ClientFrame = z.infer<typeof ClientFrame>;

/** Close codes: 4401 = not signed in (any more), 4400 = a frame that is not of the contract, 1013 = too slow, come again. */
export const CLOSE_NOT_SIGNED_IN = 4401;
export const CLOSE_BAD_FRAME = 4400;
export const CLOSE_TOO_SLOW = 1013;
