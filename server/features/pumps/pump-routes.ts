import type { Mount } from '#server/http/mount.ts';
import { pumpEndpoints } from '#shared/contract/http/pumps.ts';
import { listReadings } from './list-readings.ts';
import { listRuns } from './list-runs.ts';
import { listStrips } from './list-strips.ts';
import { readPump } from './read-pump.ts';

/** Pumps over HTTP, one or several; the list of all of them is the fleet's. */
export function mountPumpRoutes(mount: Mount): void {
  mount.person(pumpEndpoints.strips, (context, { query }) => listStrips(context, query));
  mount.person(pumpEndpoints.read, (context, { params }) => readPump(context, params.pumpId));
  mount.person(pumpEndpoints.runs, (context, { params, query }) => listRuns(context, { ...params, ...query }));
  mount.person(pumpEndpoints.readings, (context, { params, query }) => listReadings(context, { ...params, ...query }));
}
