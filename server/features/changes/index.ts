export { findCursor } from './change-read-model.ts';
export { mountChangeRoutes } from './change-routes.ts';
export { listChanges } from './list-changes.ts';
