import type { AlarmRecord, AlarmTransition } from '#shared/domain/alarms/alarm-record.ts';

/** An alarm that changed, with every transition it made, to be stored in one transaction. */
export type AlarmChange = {
  readonly alarmId: string;
  readonly companyId: string;
  /** null = it speaks for several pumps, on several pads. */
  readonly pumpId: string | null;
  readonly padId: string | null;
  readonly isNew: boolean;
  record: AlarmRecord;
  readonly transitions: AlarmTransition[];
  /** It was raised from readings that came long after they were taken. */
  readonly isBacklog: boolean;
};

/** An open alarm as it was read for a change. */
export type OpenAlarm = {
  readonly alarmId: string;
  readonly companyId: string;
  readonly pumpId: string | null;
  readonly padId: string | null;
  readonly record: AlarmRecord;
};

/** The key under which at most one alarm is open. */
export const alarmKey = (pumpId: string | null, detector: string): string => `${pumpId} ${detector}`;
