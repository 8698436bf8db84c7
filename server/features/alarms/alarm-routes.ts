import type { Mount } from '#server/http/mount.ts';
import { alarmEndpoints } from '#shared/contract/http/alarms.ts';
import { actOnAlarm } from './act-on-alarm.ts';
import { mountAlarmActRoutes } from './alarm-act-routes.ts';
import { listAlarms } from './list-alarms.ts';
import { readAlarm } from './read-alarm.ts';

/** Alarms over HTTP. */
export function mountAlarmRoutes(mount: Mount): void {
  mount.person(alarmEndpoints.list, (context, { query }) => listAlarms(context, query));
  mount.person(alarmEndpoints.read, (context, { params }) => readAlarm(context, params.alarmId));
  mount.person(alarmEndpoints.acknowledge, (context, { params: { alarmId }, body, ifMatch }) =>
    actOnAlarm(context, { alarmId, act: { kind: 'acknowledge', ...body }, ifMatch }),
  );
  mount.person(alarmEndpoints.withdrawAcknowledgement, (context, { params: { alarmId }, ifMatch }) =>
    actOnAlarm(context, { alarmId, act: { kind: 'withdraw-acknowledgement' }, ifMatch }),
  );
  mountAlarmActRoutes(mount);
}
