export { mountTariffRoutes } from './tariff-routes.ts';
