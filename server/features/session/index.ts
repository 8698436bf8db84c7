export { type Authenticate, createAuthenticate } from './authenticate.ts';
export { createEndedSessions, type EndedSessions } from './ended-sessions.ts';
export { hashPassword } from './password.ts';
export { refuseDemoPeople } from './refuse-demo-people.ts';
export { createSessionCookies } from './session-cookies.ts';
export { mountSessionRoutes } from './session-routes.ts';
export { createSignInThrottle } from './sign-in-throttle.ts';
