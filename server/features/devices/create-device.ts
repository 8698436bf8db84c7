import type { Context } from '#server/context.ts';
import { newDeviceSecret } from '#server/db/new-device-secret.ts';
import { recordAct } from '#server/db/record-act.ts';
import { conflict, invalid } from '#server/errors.ts';
import type { CreateDevice, Device } from '#shared/contract/http/devices.ts';
import { addDevice, checkPump, fitDevice } from './device-repository.ts';
import type { DeviceServices } from './device-services.ts';
import { getDevice } from './get-device.ts';

/** Registers a telemetry unit, perhaps on a pump, and answers its secret: this once, only its keyed hash is kept. */
export async function createDevice(
  context: Context,
  { hashSecret }: DeviceServices,
  input: CreateDevice,
): Promise<Device & { secret: string }> {
  if (input.pumpId !== undefined) await requireFreePump(context, input.pumpId);
  const secret = newDeviceSecret();
  const { serial, intervalSeconds } = input;
  const deviceId = await addDevice(context, { serial, intervalSeconds, secretHash: hashSecret(secret) });
  if (deviceId === undefined) throw conflict(`The serial ${serial} is registered already.`);
  if (input.pumpId !== undefined) await fitDevice(context, deviceId, input.pumpId);
  await recordAct(context, { action: 'device.registered', subjectKind: 'device', subjectId: deviceId });
  return { ...(await getDevice(context, deviceId)), secret };
}

async function requireFreePump(context: Context, pumpId: string): Promise<void> {
  const found = await checkPump(context, pumpId);
  if (found === 'missing') throw invalid('body.pumpId', 'names no pump of this company');
  if (found === 'taken') throw conflict('Another device reports this pump. End its fitting first.');
}
