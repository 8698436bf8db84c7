export { mountFleetRoutes } from './fleet-routes.ts';
