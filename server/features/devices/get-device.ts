import type { Context } from '#server/context.ts';
import { notFound } from '#server/errors.ts';
import type { Device } from '#shared/contract/http/devices.ts';
import { findDevice } from './device-read-model.ts';
import { presentDevice } from './present-device.ts';

/** One device of the company. */
export async function getDevice({ db }: Context, deviceId: string): Promise<Device> {
  const row = await findDevice(db, deviceId);
  if (row === undefined) throw notFound('device');
  return presentDevice(row);
}
