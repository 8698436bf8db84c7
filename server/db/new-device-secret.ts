import { randomBytes } from 'node:crypto';

/** A device's secret: 256 random bits, base64url. */
export const newDeviceSecret = (): string => randomBytes(32).toString('base64url');
