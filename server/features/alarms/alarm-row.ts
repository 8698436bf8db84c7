import type { AlarmRecord } from '#shared/domain/alarms/alarm-record.ts';

/** An alarm with the names a screen shows beside it; instants in ms. */
export type AlarmRow = {
  readonly id: string;
  readonly pumpId: string;
  readonly padId: string;
  readonly padName: string;
  readonly pumpName: string;
  readonly customerName: string | null;
  readonly area: string | null;
  readonly zone: string;
  readonly record: AlarmRecord;
  readonly acknowledgedByName: string | null;
  readonly shelvedByName: string | null;
  readonly technicianName: string | null;
  readonly version: number;
};
