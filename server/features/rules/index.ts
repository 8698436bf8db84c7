export { mountRuleRoutes } from './rule-routes.ts';
