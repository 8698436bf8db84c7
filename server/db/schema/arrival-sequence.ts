import { pgSequence } from 'drizzle-orm/pg-core';

/**
 * The order of arrival of readings and device events. One step is a block of numbers: a batch takes one number and
 * counts up from it row by row, so that it knows the numbers of all its rows without asking for each.
 */
export const arrivalSequence = pgSequence('arrival_sequence', { increment: 1024 });
