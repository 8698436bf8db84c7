import type { Mount } from '#server/http/mount.ts';
import { pumpEndpoints } from '#shared/contract/http/pumps.ts';
import { listFleet } from './list-fleet.ts';

export function mountFleetRoutes(mount: Mount): void {
  mount.person(pumpEndpoints.list, (context, { query }) => listFleet(context, query));
}
