export { presentPumpLive } from './present-pump-live.ts';
export { presentPumpRow } from './present-pump-row.ts';
export { presentRun } from './present-run.ts';
export { listOwnedPumps, listPumpLiveRows, openAlarmMarks } from './pump-live-read-model.ts';
export { mountPumpRoutes } from './pump-routes.ts';
export { listPumpRows } from './pump-row-read-model.ts';
export { listRunRowsChangedSince } from './run-read-model.ts';
