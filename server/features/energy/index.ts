export { mountEnergyRoutes } from './energy-routes.ts';
