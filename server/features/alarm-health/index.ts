export { mountAlarmHealthRoutes } from './alarm-health-routes.ts';
