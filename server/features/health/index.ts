export { mountHealthRoutes } from './health-routes.ts';
export type { HealthServices } from './read-health.ts';
