export { listAlarmRowsChangedSince } from './alarm-detail-read-model.ts';
export { mountAlarmRoutes } from './alarm-routes.ts';
export { hideStaffWords, presentAlarm } from './present-alarm.ts';
