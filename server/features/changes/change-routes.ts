import type { Mount } from '#server/http/mount.ts';
import { changeEndpoints } from '#shared/contract/http/changes.ts';
import { listChanges } from './list-changes.ts';

export function mountChangeRoutes(mount: Mount): void {
  mount.person(changeEndpoints.list, (context, { query }) => listChanges(context, query.since));
}
