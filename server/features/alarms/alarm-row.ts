import type { AlarmRecord } from '#shared/domain/alarms/alarm-record.ts';
import type { AreaKind } from '#shared/domain/fold/area/area-signal.ts';

/** An alarm with the names a screen shows beside it; instants in ms. */
export type AlarmRow = {
  readonly id: string;
  /** null = it speaks for several pumps. */
  readonly pumpId: string | null;
  readonly padId: string | null;
  readonly padName: string;
  readonly pumpName: string;
  readonly groupKind: AreaKind | null;
  readonly groupArea: string | null;
  readonly coveredBy: string | null;
  readonly customerName: string | null;
  readonly area: string | null;
  readonly zone: string;
  readonly record: AlarmRecord;
  readonly acknowledgedByName: string | null;
  readonly shelvedByName: string | null;
  readonly assigneeName: string | null;
  /** The pad's own. */
  readonly technicianName: string | null;
  readonly answeredByName: string | null;
  readonly doneByName: string | null;
  readonly outOfServiceByName: string | null;
  /** 1 = Monday to 7; null = not on a route. */
  readonly stopWeekday: number | null;
  readonly version: number;
};
