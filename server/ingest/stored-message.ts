import type { MotorSettings } from '#shared/domain/control/motor-settings.ts';
import type { DeviceStatus } from '#shared/domain/fold/pump-event.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';

/** What one message left in the database about a pump, in the order of arrival: what the fold reads next. */
export type StoredMessage = {
  readonly pumpId: string;
  readonly receivedAt: number;
  /** Arrival sequence of its last new row. */
  readonly sequence: number;
  readonly single: boolean;
  /** Those that were new. */
  readonly readings: readonly Reading[];
  readonly status: DeviceStatus | undefined;
  readonly settings: Partial<MotorSettings> | undefined;
};
