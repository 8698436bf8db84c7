export { mountBacktestRoutes } from './backtest-routes.ts';
