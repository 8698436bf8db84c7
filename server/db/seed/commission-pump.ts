import { newDeviceSecret } from '#server/db/new-device-secret.ts';
import { newId } from '#server/db/new-id.ts';
import { clocks } from '#server/db/schema/clocks.ts';
import { deviceFittings } from '#server/db/schema/device-fittings.ts';
import { devices } from '#server/db/schema/devices.ts';
import { equipment } from '#server/db/schema/equipment.ts';
import { inputs } from '#server/db/schema/inputs.ts';
import { motorFittings } from '#server/db/schema/motor-fittings.ts';
import { motors } from '#server/db/schema/motors.ts';
import { pumps } from '#server/db/schema/pumps.ts';
import type { Transaction } from '#server/db/transaction.ts';
import type { DemoPad, DemoPump } from '#shared/contract/demo/demo-company.ts';
import type { WiredInput } from '#shared/domain/control/pump-context.ts';
import { type CommissionedDevice, type Commissioning, idOf } from './commissioning.ts';
import { startOfLocalDay } from './local-day.ts';

type Place = { readonly pad: DemoPad; readonly padId: string; readonly pump: DemoPump };

/** Writes one pump with its motor, device, wired inputs, clocks and equipment. */
export async function commissionPump(db: Transaction, place: Place, made: Commissioning): Promise<CommissionedDevice> {
  const { pad, padId, pump } = place;
  const { companyId } = made;
  const pumpId = newId();
  await db.insert(pumps).values({
    id: pumpId,
    companyId,
    padId,
    name: pump.name,
    purpose: pump.purpose,
    wetEndModelId: idOf(made.wetEndModelIds, pump.wetEndModel),
    systemK: pump.systemK,
    nominalVolts: pump.nominalVolts,
    settings: pump.settings,
  });
  const startsAt = startOfLocalDay(pad.zone, pump.installedOn);
  await fitMotor(db, place, { companyId, pumpId, startsAt }, made);
  const clockIds = await wireInputs(db, place, { companyId, pumpId });
  for (const { kind, input, interlock, minimumGpm } of pump.equipment) {
    const clockId = input === undefined ? null : (clockIds.get(input) ?? null);
    const row = { id: newId(), companyId, padId, pumpId, kind, interlock, clockId };
    await db.insert(equipment).values({ ...row, inputNumber: input ?? null, minimumGpm: minimumGpm ?? null });
  }
  return fitDevice(db, place, { companyId, pumpId, startsAt }, made);
}

type Fitting = { readonly companyId: string; readonly pumpId: string; readonly startsAt: Date };

async function fitMotor(db: Transaction, { pad, pump }: Place, fitting: Fitting, made: Commissioning): Promise<void> {
  const motorId = newId();
  await db.insert(motors).values({
    id: motorId,
    companyId: fitting.companyId,
    modelId: idOf(made.motorModelIds, pump.motorModel),
    serial: pump.motorSerial,
    dateCode: pump.dateCode,
    warrantyEndsAt: startOfLocalDay(pad.zone, pump.warrantyUntil),
  });
  await db.insert(motorFittings).values({ id: newId(), motorId, ...fitting });
}

async function fitDevice(
  db: Transaction,
  { pump: { serial, intervalSeconds } }: Place,
  fitting: Fitting,
  { hashSecret }: Commissioning,
): Promise<CommissionedDevice> {
  const deviceId = newId();
  const secret = newDeviceSecret();
  const { companyId, pumpId, startsAt } = fitting;
  await db.insert(devices).values({
    id: deviceId,
    companyId,
    serial,
    intervalSeconds,
    secretHash: hashSecret(secret),
    secretSetAt: startsAt,
  });
  await db.insert(deviceFittings).values({ id: newId(), deviceId, ...fitting });
  return { pumpId, deviceId, serial, secret };
}

/** Every clock-driven input has a clock of its own; what comes back names them by the input's number. */
async function wireInputs(
  db: Transaction,
  { padId, pump }: Place,
  { companyId, pumpId }: Pick<Fitting, 'companyId' | 'pumpId'>,
): Promise<Map<number, string>> {
  const clockIds = new Map<number, string>();
  for (const input of pump.inputs) {
    const clockId = input.windows.length > 0 ? newId() : null;
    if (clockId !== null) {
      await db.insert(clocks).values({ id: clockId, companyId, padId, ...clockOf(pump, input) });
      clockIds.set(input.number, clockId);
    }
    const { number, kind, drives = null } = input;
    await db.insert(inputs).values({ id: newId(), companyId, pumpId, number, kind, drives, clockId });
  }
  return clockIds;
}

const clockOf = (
  pump: DemoPump,
  { number, windows, circuit = 'own', clockType = 'synchronous', drives }: WiredInput,
) => ({
  name: `${pump.name}, ${drives ?? `input ${number}`}`,
  type: clockType,
  circuit,
  trippers: windows.map(({ days, onMinute, offMinute }) => ({ days, onMinute, offMinute })),
  opensEarlyMinutes: windows[0]?.opensEarlyMinutes ?? 0,
});
