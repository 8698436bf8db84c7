import type { Mount } from '#server/http/mount.ts';
import { deviceEndpoints } from '#shared/contract/http/devices.ts';
import { revokeSecret, rotateSecret } from './change-secret.ts';
import { createDevice } from './create-device.ts';
import type { DeviceServices } from './device-services.ts';
import { listDevices } from './list-devices.ts';
import { listRefusals } from './list-refusals.ts';

/** Devices over HTTP. */
export function mountDeviceRoutes(mount: Mount, services: DeviceServices): void {
  mount.person(deviceEndpoints.list, (context, { query }) => listDevices(context, query));
  mount.person(deviceEndpoints.create, (context, { body }) => createDevice(context, services, body));
  mount.person(deviceEndpoints.rotateSecret, (context, { params, ifMatch }) =>
    rotateSecret(context, services, { ...params, ifMatch }),
  );
  mount.person(deviceEndpoints.revokeSecret, (context, { params, ifMatch }) =>
    revokeSecret(context, { ...params, ifMatch }),
  );
  mount.person(deviceEndpoints.refusals, (context, { params, query }) =>
    listRefusals(context, { ...params, ...query }),
  );
}
