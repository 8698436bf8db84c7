import type { Mount } from '#server/http/mount.ts';
import { healthEndpoints } from '#shared/contract/http/health.ts';
import { type HealthServices, readHealth } from './read-health.ts';

export function mountHealthRoutes(mount: Mount, services: HealthServices): void {
  mount.public(healthEndpoints.read, (exchange) => readHealth(services, exchange.now));
}
