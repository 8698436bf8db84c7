export { mountDeviceRoutes } from './device-routes.ts';
