import type { Mount } from '#server/http/mount.ts';
import { sessionEndpoints } from '#shared/contract/http/session.ts';
import type { Authenticate } from './authenticate.ts';
import { readSession } from './read-session.ts';
import { renewSession } from './renew-session.ts';
import type { SessionServices } from './session-services.ts';
import { signIn } from './sign-in.ts';
import { signOut } from './sign-out.ts';
import { updatePreferences } from './update-preferences.ts';

export function mountSessionRoutes(mount: Mount, services: SessionServices, authenticate: Authenticate): void {
  mount.public(sessionEndpoints.create, (exchange, { body }) => signIn(services, exchange, body));
  mount.public(sessionEndpoints.renew, (exchange) => renewSession(services, exchange));
  mount.public(sessionEndpoints.remove, async (exchange) => {
    await signOut(services, authenticate, exchange);
    return undefined;
  });
  mount.person(sessionEndpoints.read, readSession);
  mount.person(sessionEndpoints.updatePreferences, (context, { body }) => updatePreferences(context, body));
}
