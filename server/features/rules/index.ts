export { readRules } from './read-rules.ts';
export { mountRuleRoutes } from './rule-routes.ts';
