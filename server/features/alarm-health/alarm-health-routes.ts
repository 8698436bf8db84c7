import type { Mount } from '#server/http/mount.ts';
import { alarmHealthEndpoints } from '#shared/contract/http/alarm-health.ts';
import { readAlarmHealth } from './read-alarm-health.ts';

/** The health of the alarms over HTTP. */
export function mountAlarmHealthRoutes(mount: Mount): void {
  mount.person(alarmHealthEndpoints.read, (context, { query }) => readAlarmHealth(context, query));
}
