export { mountChangeRoutes } from './change-routes.ts';
export { listChanges, listNoChanges } from './list-changes.ts';
