/** The migrated database that every test database is a copy of. */
export const TEMPLATE = 'millrace_template';

/** The role that owns the schema, as the start program makes it. */
export const OWNER = { role: 'millrace_owner', password: 'owner-only-for-tests' };
