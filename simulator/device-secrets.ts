import { readFileSync } from 'node:fs';

/** The file of the data folder in which the seeded company leaves its devices' secrets. */
export const DEVICE_SECRETS_FILE = 'demo-devices.json';

/**
 * Reads the secrets, by serial: `{"devices":[{"serial":"…","secret":"…"}]}`. Undefined when the file is missing or
 * says something else.
 */
export function readDeviceSecrets(path: string): ReadonlyMap<string, string> | undefined {
  try {
    return parseDeviceSecrets(JSON.parse(readFileSync(path, 'utf8')));
  } catch {
    return undefined;
  }
}

function parseDeviceSecrets(value: unknown): ReadonlyMap<string, string> | undefined {
  const devices = (value as { devices?: unknown } | null)?.devices;
  if (!Array.isArray(devices)) return undefined;
  const secrets = new Map<string, string>();
  for (const device of devices as { serial?: unknown; secret?: unknown }[]) {
    if (typeof device?.serial === 'string' && typeof device.secret === 'string')
      secrets.set(device.serial, device.secret);
  }
  return secrets.size === 0 ? undefined : secrets;
}
