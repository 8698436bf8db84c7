import { type SQL, sql } from 'drizzle-orm';
import { pgPolicy, pgRole } from 'drizzle-orm/pg-core';

/** The login of every HTTP and socket request: sees what the signed-in person may see. */
export const millraceApp = pgRole('millrace_app').existing();

/** The login of ingest, fold, jobs, credential and sign-in lookup: works for every company, on a named list of tables. */
export const millraceMachine = pgRole('millrace_machine').existing();

/*
 * Every function call is wrapped in a sub-select without parameters: PostgreSQL then evaluates it once a statement
 * (an InitPlan) and not once a row.
 */
const ofCompany = sql`company_id = (select millrace_company())`;
const isStaff = sql`(select millrace_is_staff())`;
const isManager = sql`(select millrace_role()) = 'manager'`;

/** Rows of the company, for everyone who is signed in to it: nothing in them is private to a customer. */
export const ofCompanyOnly = ofCompany;

/** Rows of the person's own company, for managers and technicians. */
export const staffOnly = sql`${ofCompany} and ${isStaff}`;

/** Rows of the person's own company, for managers. */
export const managersOnly = sql`${ofCompany} and ${isManager}`;

/** Staff see the company's rows, a homeowner those for which `owned` holds. */
export const staffOr = (owned: SQL) => sql`${ofCompany} and (${isStaff} or ${owned})`;

/** Rows of pumps the person may see at all. */
export const ofVisiblePump = staffOr(sql`pump_id in (select p.id from pumps p)`);

/** Rows of a pump from the day on which its present owner moved in; `at` is the row's own time. */
export const ofVisiblePumpSince = (at: string) =>
  staffOr(sql`${sql.raw(at)} >= ((select millrace_visible_since()) ->> pump_id::text)::timestamptz`);

/** What the person may read through the app role. */
export const appReads = (table: string, using: SQL) =>
  pgPolicy(`${table}_app_reads`, { for: 'select', to: millraceApp, using });

/** What the person may insert, change and delete through the app role. */
export const appWrites = (table: string, rule: SQL) => [
  pgPolicy(`${table}_app_inserts`, { for: 'insert', to: millraceApp, withCheck: rule }),
  pgPolicy(`${table}_app_updates`, { for: 'update', to: millraceApp, using: rule, withCheck: rule }),
  pgPolicy(`${table}_app_deletes`, { for: 'delete', to: millraceApp, using: rule }),
];

/** The app role reads by `using`; managers write: commissioning data. */
export const commissionedByManagers = (table: string, using: SQL) => [
  appReads(table, using),
  ...appWrites(table, managersOnly),
];

export const machineWorks = (table: string) =>
  pgPolicy(`${table}_machine_works`, { for: 'all', to: millraceMachine, using: sql`true`, withCheck: sql`true` });
