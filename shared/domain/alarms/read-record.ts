import type { AlarmRecord } from './alarm-record.ts';

/** What alarms stored by an earlier version lack. */
const LATER = { assignment: null, answer: null, done: null, releasedLatch: false } as const;

/** An alarm's record as it was stored: only the functions of this folder make one, so that its shape is known. */
export const readRecord = (stored: unknown): AlarmRecord => ({ ...LATER, ...(stored as AlarmRecord) });
