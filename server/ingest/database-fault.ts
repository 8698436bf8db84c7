import pg from 'pg';

/**
 * What went wrong with a statement: `gone` = the database is not there or did not answer in time, nothing can be said
 * of the batch; `again` = it lost a race and may be tried at once; `data` = it cannot take this data, ever.
 */
export type DatabaseFault = 'gone' | 'again' | 'data';

/** Serialization failure and deadlock. */
const RACES = ['40001', '40P01'];
/** Classes of SQLSTATE that blame the data: data exception, integrity constraint, and a check on partitions. */
const DATA_CLASSES = ['22', '23'];

/** Sorts an error of the driver. */
export function classifyDatabaseFault(error: unknown): DatabaseFault {
  if (!(error instanceof pg.DatabaseError) || error.code === undefined) return 'gone';
  if (RACES.includes(error.code)) return 'again';
  return DATA_CLASSES.includes(error.code.slice(0, 2)) ? 'data' : 'gone';
}
