import type { Reading, Source } from '#shared/domain/readings/reading.ts';
import { isJsonObject, type JsonObject, parseJsonText, shortText } from './json-text.ts';
import type { OptionalReadingField, ReadingRefusal, RefusedMessage } from './refusal.ts';
import { MAX_READINGS_PER_MESSAGE } from './wire-limits.ts';

export type { Reading, Source };

/** What the receiver knows and the message cannot: the motor's inputs and the span of time it still takes. */
export type ReadingLimits = {
  /** Inputs of the motor model, 1 to 8; without it 8. */
  readonly inputCount?: number | undefined;
  /** Readings later than this are `ahead`, ms. */
  readonly notAfter?: number | undefined;
  /** Readings earlier than this are `too-old`, ms. */
  readonly notBefore?: number | undefined;
};

export type RefusedReading = { readonly index: number; readonly reason: ReadingRefusal };
export type DroppedField = { readonly index: number; readonly field: OptionalReadingField };

/** `single` says that the message was one reading, not an array. */
export type DecodedReadings =
  | {
      readonly kind: 'readings';
      readonly single: boolean;
      readonly readings: Reading[];
      readonly refused: RefusedReading[];
      readonly dropped: DroppedField[];
    }
  | RefusedMessage;

const SOURCES: Readonly<Record<Source, true>> = {
  off: true,
  prime: true,
  input: true,
  keypad: true,
  timed: true,
  freeze: true,
  program: true,
  fault: true,
  stop: true,
};

function isSource(value: unknown): value is Source {
  return typeof value === 'string' && Object.hasOwn(SOURCES, value);
}

/** The largest time a reading may bear: the year 2200, so that a garbled counter is refused by name. */
const LATEST_TIME_MS = 7_258_118_400_000;

/**
 * Decodes a readings message: one reading or an array of 1 to 500, oldest first. A bad reading is refused alone with
 * its reason, a bad optional field is dropped alone, an unknown field is ignored; only a message that is no JSON, no
 * object, empty or too long is refused whole. `t` must increase strictly from one accepted reading to the next.
 *
 * @example decodeReadings('{"t":1760000000000,"rpm":1700,"in":0,"act":0,"w":-3}')
 * // { kind: 'readings', single: true, readings: [], refused: [{ index: 0, reason: 'w-negative' }], dropped: [] }
 */
export function decodeReadings(text: string, limits: ReadingLimits = {}): DecodedReadings {
  return readReadings(parseJsonText(text), limits);
}

/** The same as `decodeReadings`, from a value that is parsed already. */
export function readReadings(value: unknown, limits: ReadingLimits = {}): DecodedReadings {
  if (value === undefined) return { kind: 'refused', reason: 'not-json' };
  if (!Array.isArray(value)) {
    return isJsonObject(value) ? readElements([value], limits, true) : { kind: 'refused', reason: 'not-an-object' };
  }
  if (value.length === 0) return { kind: 'refused', reason: 'empty' };
  if (value.length > MAX_READINGS_PER_MESSAGE) return { kind: 'refused', reason: 'too-many' };
  return readElements(value, limits, false);
}

function readElements(elements: readonly unknown[], limits: ReadingLimits, single: boolean): DecodedReadings {
  const readings: Reading[] = [];
  const refused: RefusedReading[] = [];
  const dropped: DroppedField[] = [];
  let last = -1;
  for (let index = 0; index < elements.length; index += 1) {
    const element = elements[index];
    const reason = isJsonObject(element) ? findFault(element, last, limits) : 'reading-not-an-object';
    if (reason !== undefined) {
      refused.push({ index, reason });
      continue;
    }
    const reading = toReading(element as RequiredFields, index, dropped);
    last = reading.at;
    readings.push(reading);
  }
  return { kind: 'readings', single, readings, refused, dropped };
}

/** A reading whose required fields `findFault` has passed. */
type RequiredFields = JsonObject & {
  readonly t: number;
  readonly rpm: number;
  readonly in: number;
  readonly act: number;
  readonly w: number;
};

function findFault(fields: JsonObject, last: number, limits: ReadingLimits): ReadingRefusal | undefined {
  return (
    findTimeFault(fields.t, last, limits) ??
    findRpmFault(fields.rpm) ??
    findInputsFault(fields.in, fields.act, limits.inputCount ?? 8) ??
    findWattsFault(fields.w)
  );
}

function findTimeFault(t: unknown, last: number, limits: ReadingLimits): ReadingRefusal | undefined {
  if (t === undefined) return 't-missing';
  if (typeof t !== 'number' || !Number.isSafeInteger(t)) return 't-not-an-integer';
  if (t < 0 || t > LATEST_TIME_MS) return 't-out-of-range';
  if (limits.notAfter !== undefined && t > limits.notAfter) return 'ahead';
  if (limits.notBefore !== undefined && t < limits.notBefore) return 'too-old';
  return t <= last ? 't-not-increasing' : undefined;
}

function findRpmFault(rpm: unknown): ReadingRefusal | undefined {
  if (rpm === undefined) return 'rpm-missing';
  if (typeof rpm !== 'number' || !Number.isFinite(rpm)) return 'rpm-not-a-number';
  if (rpm < 0) return 'rpm-negative';
  return rpm > 4000 ? 'rpm-out-of-range' : undefined;
}

function findInputsFault(closed: unknown, active: unknown, inputCount: number): ReadingRefusal | undefined {
  if (closed === undefined) return 'in-missing';
  if (typeof closed !== 'number' || !Number.isInteger(closed)) return 'in-not-an-integer';
  if (closed < 0 || closed > 255) return 'in-out-of-range';
  if (closed >= 1 << inputCount) return 'in-beyond-model';
  if (active === undefined) return 'act-missing';
  if (typeof active !== 'number' || !Number.isInteger(active)) return 'act-not-an-integer';
  if (active < 0 || active > 8) return 'act-out-of-range';
  return active > inputCount ? 'act-beyond-model' : undefined;
}

function findWattsFault(watts: unknown): ReadingRefusal | undefined {
  if (watts === undefined) return 'w-missing';
  if (typeof watts !== 'number' || !Number.isFinite(watts)) return 'w-not-a-number';
  if (watts < 0) return 'w-negative';
  return watts > 6000 ? 'w-out-of-range' : undefined;
}

// One literal for every reading: engines keep one hidden class, which the fold reads faster.
function toReading(fields: RequiredFields, index: number, dropped: DroppedField[]): Reading {
  return {
    at: fields.t,
    rpm: fields.rpm,
    closedInputs: fields.in,
    activeInput: fields.act,
    watts: fields.w,
    reportedSource: optional(fields.src, 'src', index, dropped, isSource),
    volts: optional(fields.v, 'v', index, dropped, isVolts),
    driveCelsius: optional(fields.td, 'td', index, dropped, isCelsius),
    ambientCelsius: optional(fields.ta, 'ta', index, dropped, isCelsius),
    motorClockMinute: optional(fields.mc, 'mc', index, dropped, isMinuteOfDay),
    fault: optional(fields.flt, 'flt', index, dropped, isFaultCode),
  };
}

function optional<T>(
  value: unknown,
  field: OptionalReadingField,
  index: number,
  dropped: DroppedField[],
  accepts: (value: unknown) => value is T,
): T | undefined {
  if (value === undefined) return undefined;
  if (accepts(value)) return value;
  dropped.push({ index, field });
  return undefined;
}

function isVolts(value: unknown): value is number {
  return typeof value === 'number' && value >= 0 && value <= 1000;
}

function isCelsius(value: unknown): value is number {
  return typeof value === 'number' && value >= -60 && value <= 250;
}

function isMinuteOfDay(value: unknown): value is number {
  return typeof value === 'number' && Number.isInteger(value) && value >= 0 && value <= 1439;
}

function isFaultCode(value: unknown): value is string {
  return shortText(value, 16) !== undefined;
}
