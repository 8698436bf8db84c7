import type { AlarmRecord } from './alarm-record.ts';

/** What alarms stored by an earlier version lack. */
const LATER = { assignment: null, answer: null, done: null, releasedLatch: false } as const;

/**
 * An alarm's record as it was stored: only the functions of this folder make one, so that its shape is known.
 *
 * @example readRecord(row.record).done // null in a record from before notes were worked off
 */
export const readRecord = (stored: unknown): AlarmRecord => ({ ...LATER, ...(stored as AlarmRecord) });
