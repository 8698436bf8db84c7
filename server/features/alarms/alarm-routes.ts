import type { Mount } from '#server/http/mount.ts';
import { alarmEndpoints } from '#shared/contract/http/alarms.ts';
import { acknowledgeAlarm } from './acknowledge-alarm.ts';
import { listAlarms } from './list-alarms.ts';
import { readAlarm } from './read-alarm.ts';
import { withdrawAcknowledgement } from './withdraw-acknowledgement.ts';

/** Alarms over HTTP. */
export function mountAlarmRoutes(mount: Mount): void {
  mount.person(alarmEndpoints.list, (context, { query }) => listAlarms(context, query));
  mount.person(alarmEndpoints.read, (context, { params }) => readAlarm(context, params.alarmId));
  mount.person(alarmEndpoints.acknowledge, (context, { params, body, ifMatch }) =>
    acknowledgeAlarm(context, { alarmId: params.alarmId, note: body.note, ifMatch }),
  );
  mount.person(alarmEndpoints.withdrawAcknowledgement, (context, { params }) =>
    withdrawAcknowledgement(context, params.alarmId),
  );
}
