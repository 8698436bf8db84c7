import type { MotorSettings, ProgramEntry } from '#shared/domain/control/motor-settings.ts';
import { isJsonObject, type JsonObject, parseJsonText } from './json-text.ts';
import { formatDays, formatMinuteOfDay, parseDays, parseMinuteOfDay } from './wall-time.ts';

export type { MotorSettings };

export const SETTINGS_FIELDS = ['inputs', 'program', 'prime', 'timed', 'freeze', 'max', 'min'] as const;
export type SettingsField = (typeof SETTINGS_FIELDS)[number];

/** A field that is dropped, or one entry of the program (`index`) that is refused alone, and why. */
export type SettingsFault = { readonly field: SettingsField; readonly index?: number; readonly reason: string };

export type DecodedSettings =
  | { readonly kind: 'settings'; readonly settings: Partial<MotorSettings>; readonly faults: readonly SettingsFault[] }
  | { readonly kind: 'refused'; readonly reason: 'not-json' | 'not-an-object' };

/** A field read, or the reason why it is dropped. */
type Field<T> = { readonly value: T } | { readonly reason: string };

const MAX_PROGRAM_ENTRIES = 64;

/**
 * Decodes what a motor says it is set to. Every field is optional; a bad one is dropped alone and named, a bad entry
 * of the program is refused alone, an unknown field is ignored. Speeds are 1 to 4000 rpm; null = not used.
 *
 * @example decodeSettings('{"max":3450,"min":0}')
 * // { kind: 'settings', settings: { maxRpm: 3450 }, faults: [{ field: 'min', reason: 'rpm-out-of-range' }] }
 */
export function decodeSettings(text: string): DecodedSettings {
  return readSettings(parseJsonText(text));
}

/** The same as `decodeSettings`, from a value that is parsed already. */
export function readSettings(value: unknown): DecodedSettings {
  if (value === undefined) return { kind: 'refused', reason: 'not-json' };
  if (!isJsonObject(value)) return { kind: 'refused', reason: 'not-an-object' };
  const faults: SettingsFault[] = [];
  const take = <T>(field: SettingsField, read: (fieldValue: unknown) => Field<T>): T | undefined => {
    const fieldValue = value[field];
    if (fieldValue === undefined) return undefined;
    const result = read(fieldValue);
    if ('value' in result) return result.value;
    faults.push({ field, reason: result.reason });
    return undefined;
  };
  const settings: { -readonly [K in keyof MotorSettings]?: MotorSettings[K] } = {};
  const inputs = take('inputs', readInputs);
  const program = take('program', (list) => readProgram(list, faults));
  const prime = take('prime', nullOr(readPrime));
  const timed = take('timed', nullOr(readTimed));
  const freeze = take('freeze', nullOr(readFreeze));
  const maxRpm = take('max', readRpm);
  const minRpm = take('min', readRpm);
  if (inputs !== undefined) settings.inputs = inputs;
  if (program !== undefined) settings.program = program;
  if (prime !== undefined) settings.prime = prime;
  if (timed !== undefined) settings.timed = timed;
  if (freeze !== undefined) settings.freeze = freeze;
  if (maxRpm !== undefined) settings.maxRpm = maxRpm;
  if (minRpm !== undefined) settings.minRpm = minRpm;
  return { kind: 'settings', settings, faults };
}

function readRpm(value: unknown): Field<number> {
  const rpm = number(value, 1, 4000);
  return rpm === undefined ? { reason: 'rpm-out-of-range' } : { value: rpm };
}

function readInputs(value: unknown): Field<(number | null)[]> {
  if (!Array.isArray(value) || value.length < 1 || value.length > 8) return { reason: 'not-a-list-of-1-to-8' };
  const inputs = value.map((element) => (element === null ? null : number(element, 1, 4000)));
  const speeds = inputs.filter((rpm) => rpm !== undefined);
  return speeds.length === inputs.length ? { value: speeds } : { reason: 'rpm-out-of-range' };
}

function readProgram(value: unknown, faults: SettingsFault[]): Field<ProgramEntry[]> {
  if (!Array.isArray(value)) return { reason: 'not-a-list' };
  if (value.length > MAX_PROGRAM_ENTRIES) return { reason: 'too-many-entries' };
  const entries: ProgramEntry[] = [];
  for (const [index, element] of value.entries()) {
    const entry: Field<ProgramEntry> = isJsonObject(element) ? readProgramEntry(element) : { reason: 'not-an-object' };
    if ('value' in entry) entries.push(entry.value);
    else faults.push({ field: 'program', index, reason: entry.reason });
  }
  return { value: entries };
}

/** Reads one program entry; `to` at or before `from` ends the next day, `from` = `to` is refused. */
function readProgramEntry(fields: JsonObject): Field<ProgramEntry> {
  const days = parseDays(fields.days);
  const fromMinute = parseMinuteOfDay(fields.from);
  const toMinute = parseMinuteOfDay(fields.to);
  const rpm = number(fields.rpm, 1, 4000);
  if (days === undefined) return { reason: 'days-invalid' };
  if (fromMinute === undefined || fromMinute === 1440) return { reason: 'from-invalid' };
  if (toMinute === undefined) return { reason: 'to-invalid' };
  if (toMinute === fromMinute) return { reason: 'no-length' };
  if (rpm === undefined) return { reason: 'rpm-out-of-range' };
  // The domain writes midnight at the end of a day as 1440, never as 0.
  return { value: { days, fromMinute, toMinute: toMinute === 0 ? 1440 : toMinute, rpm } };
}

function readPrime(fields: JsonObject): Field<NonNullable<MotorSettings['prime']>> {
  const rpm = number(fields.rpm, 1, 4000);
  const seconds = number(fields.s, 1, 3600);
  if (rpm === undefined) return { reason: 'rpm-out-of-range' };
  return seconds === undefined ? { reason: 's-out-of-range' } : { value: { rpm, seconds } };
}

function readTimed(fields: JsonObject): Field<NonNullable<MotorSettings['timed']>> {
  const rpm = number(fields.rpm, 1, 4000);
  const minutes = number(fields.min, 1, 1440);
  if (rpm === undefined) return { reason: 'rpm-out-of-range' };
  return minutes === undefined ? { reason: 'min-out-of-range' } : { value: { rpm, minutes } };
}

function readFreeze(fields: JsonObject): Field<NonNullable<MotorSettings['freeze']>> {
  const celsius = number(fields.c, -40, 40);
  const rpm = number(fields.rpm, 1, 4000);
  if (celsius === undefined) return { reason: 'c-out-of-range' };
  return rpm === undefined ? { reason: 'rpm-out-of-range' } : { value: { celsius, rpm } };
}

function nullOr<T>(read: (fields: JsonObject) => Field<T>): (value: unknown) => Field<T | null> {
  return (value) => {
    if (value === null) return { value };
    return isJsonObject(value) ? read(value) : { reason: 'not-an-object' };
  };
}

function number(value: unknown, min: number, max: number): number | undefined {
  return typeof value === 'number' && value >= min && value <= max ? value : undefined;
}

/** Writes a settings message; fields that are absent stay out of it. */
export function encodeSettings(settings: Partial<MotorSettings>): string {
  const { prime, timed, freeze } = settings;
  return JSON.stringify({
    inputs: settings.inputs,
    program: settings.program?.map((entry) => ({
      days: formatDays(entry.days),
      from: formatMinuteOfDay(entry.fromMinute),
      to: formatMinuteOfDay(entry.toMinute),
      rpm: entry.rpm,
    })),
    prime: prime ? { rpm: prime.rpm, s: prime.seconds } : prime,
    timed: timed ? { rpm: timed.rpm, min: timed.minutes } : timed,
    freeze: freeze ? { c: freeze.celsius, rpm: freeze.rpm } : freeze,
    max: settings.maxRpm,
    min: settings.minRpm,
  });
}
