import { bigint, customType, timestamp, uuid } from 'drizzle-orm/pg-core';

/** Ids are UUIDs of version 7, made by the application. */
export const id = () => uuid().primaryKey();

/** The tenant. Every row that belongs to a company names it, and row-level security compares it. */
export const companyId = () => uuid('company_id').notNull();

/** An instant, with its zone. */
export const instant = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' });

/** PostgreSQL's 64-bit transaction number, as text: it outgrows a JavaScript number. */
export const xid8 = customType<{ data: string }>({ dataType: () => 'xid8' });

/** A growing number that fits a JavaScript number for longer than any database will live. */
export const sequenceNumber = (name: string) => bigint(name, { mode: 'number' });

/** Bytes: a keyed hash, a sealed text. */
export const bytes = customType<{ data: Buffer }>({ dataType: () => 'bytea' });
