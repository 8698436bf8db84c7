import { sql } from 'drizzle-orm';

/**
 * Whether an alarm `a` was set aside, by a person or by design, so that it calls nobody: for statements that are written
 * as text.
 *
 * @example `select id from alarms a where not ${SET_ASIDE}`
 */
export const SET_ASIDE = '(a.shelved_until is not null or a.suppressed or a.out_of_service)';

/** The same for Drizzle's statements. */
export const isSetAside = sql.raw(SET_ASIDE);
