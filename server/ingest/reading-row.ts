import { type Reading, SOURCES } from '#shared/domain/readings/reading.ts';

/** A stored reading as the fold reads it back. */
export type ReadingRow = {
  readonly at: number;
  readonly rpm: number;
  readonly watts: number;
  readonly closed_inputs: number;
  readonly active_input: number;
  readonly flags: number;
  readonly volts: number | null;
  readonly drive_celsius: number | null;
  readonly ambient_celsius: number | null;
  readonly source: number | null;
  readonly motor_clock: number | null;
  readonly fault: string | null;
};

/** Bit 0 of a stored reading's flags: it came alone in its message. */
export const SINGLE_FLAG = 1;

/** Columns of a ReadingRow, from `readings r`; times are ms. */
export const READING_COLUMNS = `date_part('epoch', r.at) * 1000 as at, r.rpm, r.watts, r.closed_inputs, r.active_input, r.flags,
  r.volts, r.drive_celsius, r.ambient_celsius, r.source, r.motor_clock, r.fault`;

/** The reading of a row; its fields stand in the decoder's order, so that both have one hidden class. */
export function toReading(row: ReadingRow): Reading {
  return {
    at: Math.round(row.at),
    rpm: row.rpm,
    closedInputs: row.closed_inputs,
    activeInput: row.active_input,
    watts: row.watts,
    reportedSource: row.source === null ? undefined : SOURCES[row.source],
    volts: row.volts ?? undefined,
    driveCelsius: row.drive_celsius ?? undefined,
    ambientCelsius: row.ambient_celsius ?? undefined,
    motorClockMinute: row.motor_clock ?? undefined,
    fault: row.fault ?? undefined,
  };
}
