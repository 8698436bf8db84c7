import type { Context } from '#server/context.ts';
import { newDeviceSecret } from '#server/db/new-device-secret.ts';
import { recordAct } from '#server/db/record-act.ts';
import { notFound } from '#server/errors.ts';
import { type ExpectedVersion, requireVersion } from '#server/http/etag.ts';
import type { Device } from '#shared/contract/http/devices.ts';
import { findDeviceForUpdate, type LockedDevice, saveSecret } from './device-repository.ts';
import type { DeviceServices } from './device-services.ts';
import { getDevice } from './get-device.ts';

type Change = { readonly deviceId: string; readonly ifMatch: ExpectedVersion };

async function getLocked(context: Context, { deviceId, ifMatch }: Change): Promise<LockedDevice> {
  const device = await findDeviceForUpdate(context, deviceId);
  if (device === undefined) throw notFound('device');
  requireVersion(ifMatch, device.version);
  return device;
}

/** Gives a unit a new secret and answers it this once; the connection that the old one opened is closed. */
export async function rotateSecret(
  context: Context,
  { hashSecret }: DeviceServices,
  change: Change,
): Promise<Device & { secret: string }> {
  const device = await getLocked(context, change);
  const secret = newDeviceSecret();
  await saveSecret(context, device, hashSecret(secret));
  await recordAct(context, { action: 'device.secret-rotated', subjectKind: 'device', subjectId: device.id });
  return { ...(await getDevice(context, device.id)), secret };
}

/** Takes a unit's secret away: it is cut off at once and cannot connect until it gets a new one. */
export async function revokeSecret(context: Context, change: Change): Promise<Device> {
  const device = await getLocked(context, change);
  await saveSecret(context, device, null);
  await recordAct(context, { action: 'device.secret-revoked', subjectKind: 'device', subjectId: device.id });
  return getDevice(context, device.id);
}
