import { sql } from 'drizzle-orm';
import { index, integer, pgPolicy, pgTable, primaryKey, real, smallint, text } from 'drizzle-orm/pg-core';
import { instant, sequenceNumber } from './columns.ts';
import { machineWorks, millraceApp } from './policies.ts';

/**
 * Raw readings, one partition a UTC day by device time, kept 60 days. No default partition: a reading beyond those
 * that exist is refused before it gets here. Columns run from wide to narrow so that none is padded.
 *
 * The key is (pump, device time): the second copy of a reading meets it and changes nothing. The tenant is not in the
 * row, which is written ten thousand times a day and a pump: the rule compares the pump's number instead.
 */
export const readings = pgTable(
  'readings',
  {
    at: instant('at').notNull(),
    receivedAt: instant('received_at').notNull(),
    /** Order of arrival, in one row of numbers with device events: what the fold's cursor counts. */
    sequence: sequenceNumber('sequence').notNull().default(sql`nextval('arrival_sequence')`),
    pumpNumber: integer('pump_number').notNull(),
    rpm: real().notNull(),
    watts: real().notNull(),
    volts: real(),
    driveCelsius: real('drive_celsius'),
    ambientCelsius: real('ambient_celsius'),
    closedInputs: smallint('closed_inputs').notNull(),
    activeInput: smallint('active_input').notNull(),
    /** Place of what the motor says commands it in the list of sources, from 0; null = it did not say. */
    source: smallint(),
    /** The motor's own clock, minutes after midnight. */
    motorClock: smallint('motor_clock'),
    /** Bit 0: it came alone in its message. */
    flags: smallint().notNull().default(0),
    fault: text(),
  },
  (table) => [
    primaryKey({ name: 'readings_pkey', columns: [table.pumpNumber, table.at] }),
    // Rows lie in order of arrival, so a few bytes a megabyte find what came after a cursor.
    index('readings_sequence_index').using('brin', table.sequence),
    pgPolicy('readings_app_reads', {
      for: 'select',
      to: millraceApp,
      using: sql`((select millrace_is_staff()) and pump_number in (select p.number from pumps p))
        or at >= ((select millrace_visible_numbers_since()) ->> pump_number::text)::timestamptz`,
    }),
    machineWorks('readings'),
  ],
);
