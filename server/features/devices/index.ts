export { mountDeviceRoutes } from './device-routes.ts';
export type { DeviceServices } from './device-services.ts';
