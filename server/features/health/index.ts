export { mountHealthRoutes } from './health-routes.ts';
