import { pumpEndpoints, type Strip } from '#shared/contract/http/pumps.ts';
import { call } from '#src/lib/api/api-client.ts';
import { ApiError } from '#src/lib/api/api-error.ts';
import { createBatcher } from '#src/lib/create-batcher.ts';
import type { TimeWindow } from './align-window.ts';

/** The contract's own limit on pumps a call. */
const MOST_PUMPS = 100;

const batchers = new Map<string, (pumpId: string) => Promise<Strip>>();

async function loadStrips(pumps: readonly string[], { from, until }: TimeWindow): Promise<Map<string, Strip>> {
  const { strips } = await call(pumpEndpoints.strips, { query: { pumps: [...pumps], from, until } });
  return new Map(strips.map((strip) => [strip.pumpId, strip]));
}

/** Runs and plan of one pump in a window; calls made in the same moment share one request. */
export function loadStrip(pumpId: string, window: TimeWindow): Promise<Strip> {
  const key = `${window.from} ${window.until}`;
  const known = batchers.get(key);
  if (known !== undefined) return known(pumpId);
  const batcher = createBatcher({
    load: (pumps: readonly string[]) => loadStrips(pumps, window),
    missing: () => new ApiError('not-found', 'no strip for this pump'),
    most: MOST_PUMPS,
    defer: (run) => setTimeout(run, 10),
  });
  // Windows come and go with the clock: old ones are forgotten with the rest.
  if (batchers.size > 50) batchers.clear();
  batchers.set(key, batcher);
  return batcher(pumpId);
}
