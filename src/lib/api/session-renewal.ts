import { API_VERSION, API_VERSION_HEADER } from '#shared/contract/errors.ts';
import { sessionEndpoints } from '#shared/contract/http/session.ts';

let running: Promise<boolean> | undefined;

async function renew(): Promise<boolean> {
  const { method, path } = sessionEndpoints.renew;
  try {
    const response = await fetch(path, { method, headers: { [API_VERSION_HEADER]: API_VERSION } });
    return response.ok;
  } catch {
    return false;
  }
}

/**
 * Renews the session from its refresh cookie and says whether it worked. Many calls may find out at once that the
 * session has run out: they share one renewal.
 */
export function renewSession(): Promise<boolean> {
  running ??= renew().finally(() => {
    running = undefined;
  });
  return running;
}
