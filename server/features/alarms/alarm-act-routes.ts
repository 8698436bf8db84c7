import type { Mount } from '#server/http/mount.ts';
import { type AlarmAct, alarmActEndpoints as endpoints } from '#shared/contract/http/alarm-acts.ts';
import { actOnAlarm } from './act-on-alarm.ts';
import { actOnAlarms } from './act-on-alarms.ts';
import { listTechnicians } from './list-technicians.ts';

type Undo = Pick<
  typeof endpoints,
  'unshelve' | 'returnToService' | 'unassign' | 'withdrawNothingToDo' | 'withdrawWorkOff'
>;

/** What takes each thing back. */
const UNDO: Readonly<Record<keyof Undo, AlarmAct>> = {
  unshelve: { kind: 'unshelve' },
  returnToService: { kind: 'return-to-service' },
  unassign: { kind: 'unassign' },
  withdrawNothingToDo: { kind: 'withdraw-nothing-to-do' },
  withdrawWorkOff: { kind: 'withdraw-work-off' },
};

/** What people do about alarms, over HTTP. */
export function mountAlarmActRoutes(mount: Mount): void {
  mount.person(endpoints.technicians, listTechnicians);
  mount.person(endpoints.actOnMany, (context, { body }) => actOnAlarms(context, body));
  mount.person(endpoints.shelve, (context, { params: { alarmId }, body, ifMatch }) =>
    actOnAlarm(context, { alarmId, act: { kind: 'shelve', ...body }, ifMatch }),
  );
  mount.person(endpoints.takeOutOfService, (context, { params: { alarmId }, body, ifMatch }) =>
    actOnAlarm(context, { alarmId, act: { kind: 'take-out-of-service', ...body }, ifMatch }),
  );
  mount.person(endpoints.assign, (context, { params: { alarmId }, body, ifMatch }) =>
    actOnAlarm(context, { alarmId, act: { kind: 'assign', ...body }, ifMatch }),
  );
  mount.person(endpoints.nothingToDo, (context, { params: { alarmId }, body, ifMatch }) =>
    actOnAlarm(context, { alarmId, act: { kind: 'nothing-to-do', ...body }, ifMatch }),
  );
  mount.person(endpoints.workOff, (context, { params: { alarmId }, body, ifMatch }) =>
    actOnAlarm(context, { alarmId, act: { kind: 'work-off', ...body }, ifMatch }),
  );
  for (const name of Object.keys(UNDO) as (keyof Undo)[]) {
    mount.person(endpoints[name], (context, { params: { alarmId }, ifMatch }) =>
      actOnAlarm(context, { alarmId, act: UNDO[name], ifMatch }),
    );
  }
}
