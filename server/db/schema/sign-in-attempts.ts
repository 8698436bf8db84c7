import { bigint, integer, pgTable, varchar } from 'drizzle-orm/pg-core';
import { machineWorks } from './policies.ts';

/** The rate limiter's own table, in the shape it expects; it bears no tenant, because nobody is signed in yet. */
export const signInAttempts = pgTable(
  'sign_in_attempts',
  {
    key: varchar({ length: 255 }).primaryKey(),
    points: integer().notNull().default(0),
    expire: bigint({ mode: 'number' }),
  },
  () => [machineWorks('sign_in_attempts')],
);
