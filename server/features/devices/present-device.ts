import type { Device } from '#shared/contract/http/devices.ts';
import type { DeviceRow } from './device-read-model.ts';

/** A device as a manager reads it; never its secret. */
export function presentDevice(row: DeviceRow): Device {
  return {
    id: row.id,
    serial: row.serial,
    pumpId: row.pumpId,
    padName: row.padName,
    intervalSeconds: row.intervalSeconds,
    state: row.state,
    firmware: row.firmware,
    heardAt: row.heardAt,
    secretSetAt: row.secretSetAt,
    revokedAt: row.revokedAt,
    refused: row.refused,
    version: row.version,
  };
}
