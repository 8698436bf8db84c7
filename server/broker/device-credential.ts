import { createHmac, timingSafeEqual } from 'node:crypto';

/** What the broker has to know of a device to let it in. */
export type DeviceCredential = {
  readonly serial: string;
  /** HMAC-SHA256 of the device's secret under the device key; undefined = revoked, or never given. */
  readonly secretHash: Buffer | undefined;
};

/** The keyed hash under which a device's secret is stored: 32 bytes. */
export function hashDeviceSecret(deviceKey: Buffer | string, secret: Buffer | string): Buffer {
  return createHmac('sha256', deviceKey).update(secret).digest();
}

/** Whether a password is the device's secret, in constant time; false for a revoked device. */
export function isDeviceSecret(deviceKey: Buffer | string, credential: DeviceCredential, password: Buffer): boolean {
  const { secretHash } = credential;
  const offered = hashDeviceSecret(deviceKey, password);
  return secretHash !== undefined && secretHash.length === offered.length && timingSafeEqual(secretHash, offered);
}
