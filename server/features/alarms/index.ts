export { listAlarmRowsChangedSince } from './alarm-detail-read-model.ts';
export { mountAlarms } from './alarm-routes.ts';
export type { AlarmRow } from './alarm-row.ts';
export { presentAlarm } from './present-alarm.ts';
