import { pgSequence } from 'drizzle-orm/pg-core';

/** Numbers readings and device events in the order of their arrival. */
export const arrivalSequence = pgSequence('arrival_sequence');
