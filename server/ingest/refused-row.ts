import type { Arrival } from './arrival.ts';
import type { Refusal } from './describe-refusals.ts';

/** A refusal with whose it is, as it is kept. */
export type RefusedRow = Refusal & {
  readonly companyId: string;
  readonly deviceId: string;
  readonly receivedAt: number;
};

/** The row of what was refused of a message; undefined when all of it was good. */
export function toRefusedRow({ device, receivedAt, decoded }: Arrival): RefusedRow | undefined {
  const { companyId, deviceId } = device;
  return decoded.refusal && { ...decoded.refusal, companyId, deviceId, receivedAt };
}
