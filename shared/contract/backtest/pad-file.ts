import { z } from 'zod';
import { DEFAULT_TRAITS } from '#shared/domain/control/motor-settings.ts';
import {
  EQUIPMENT_KINDS,
  INPUT_DUTIES,
  INPUT_KINDS,
  INTERLOCKS,
  PAD_STATES,
  type PumpContext,
} from '#shared/domain/control/pump-context.ts';
import { isKnownZone } from '#shared/domain/time/is-known-zone.ts';
import { Serial } from '../http/devices.ts';
import { isJsonObject, type JsonObject } from '../mqtt/json-text.ts';
import { readSettings } from '../mqtt/settings.ts';
import { parseDays, parseMinuteOfDay } from '../mqtt/wall-time.ts';
import { toPumpContext } from './to-pump-context.ts';

const minuteOfDay = z.unknown().transform((value, context) => {
  const minute = parseMinuteOfDay(value);
  if (minute === undefined) context.addIssue({ code: 'custom', message: 'wants HH:MM, 00:00 to 24:00' });
  return minute ?? 0;
});

const days = z.unknown().transform((value, context) => {
  const flags = parseDays(value);
  if (flags === undefined) context.addIssue({ code: 'custom', message: 'wants seven digits 0 or 1, Monday to Sunday' });
  return flags ?? [];
});

/** Only a prime, a timed run and freeze protection can be off; null elsewhere says no more than a missing field. */
const withoutNullLimits = (fields: JsonObject): JsonObject =>
  Object.fromEntries(
    Object.entries(fields).filter(([name, field]) => field !== null || ['prime', 'timed', 'freeze'].includes(name)),
  );

const settings = z.unknown().transform((value, context) => {
  const decoded = readSettings(isJsonObject(value) ? withoutNullLimits(value) : value);
  if (decoded.kind === 'refused') {
    context.addIssue({
      code: 'custom',
      message: 'wants an object with inputs, program, prime, timed, freeze, max, min',
    });
    return {};
  }
  for (const fault of decoded.faults) {
    context.addIssue({
      code: 'custom',
      message: fault.reason,
      path: [fault.field, ...(fault.index === undefined ? [] : [fault.index])],
    });
  }
  return decoded.settings;
});

const window = z.object({
  days,
  on: minuteOfDay,
  off: minuteOfDay,
  opensEarlyMin: z.number().min(0).max(120).default(0),
});

const input = z.object({
  n: z.number().int().min(1).max(8),
  kind: z.enum(INPUT_KINDS).default('clock'),
  windows: z.array(window).max(16).default([]),
  drives: z.enum(INPUT_DUTIES).optional(),
  circuit: z.enum(['motor', 'own']).optional(),
  type: z.enum(['synchronous', 'spring-carry-over', 'battery-carry-over', 'electronic']).optional().catch(undefined),
});

const positive = z.number().positive();

/** One pad of pads.json. Units: gpm, ft, W, k in ft/gpm², gallons, volts, seconds. */
export const BacktestPad = z.object({
  serial: Serial,
  timezone: z.string().refine(isKnownZone, 'wants the IANA name of a time zone, like America/Phoenix'),
  area: z.string().max(60).optional(),
  state: z.enum(PAD_STATES).default('open'),
  settings,
  inputs: z.array(input).max(8).default([]),
  equipment: z
    .array(
      z.object({
        kind: z.enum(EQUIPMENT_KINDS),
        input: z.number().int().min(1).max(8).optional(),
        minGpm: z.number().min(0).optional(),
        interlock: z.enum(INTERLOCKS).default('unknown'),
      }),
    )
    .default([]),
  model: z
    .object({
      refRpm: positive.max(4000).optional(),
      points: z.array(z.object({ gpm: z.number().min(0), ft: z.number().min(0), w: z.number().min(0) })).optional(),
      standbyW: z.number().min(0).default(0),
      driveHotC: z.number().default(DEFAULT_TRAITS.driveHotCelsius),
      inputCount: z.number().int().min(0).max(8).optional(),
      stopBeatsInputs: z.boolean().default(DEFAULT_TRAITS.stopBeatsInputs),
      timedResumes: z.boolean().default(DEFAULT_TRAITS.timedResumes),
      programOverlap: z.enum(['first-listed', 'higher-speed']).default(DEFAULT_TRAITS.programOverlap),
    })
    .optional(),
  system: z.object({ k: positive }).optional(),
  pool: z.object({ gal: positive }).optional(),
  turnoversPerDay: positive.optional(),
  nominalV: positive.optional(),
  intervalS: z.number().min(1).max(3600).default(10),
});
export type BacktestPad = z.infer<typeof BacktestPad>;

export type PadFile = {
  readonly pads: readonly PumpContext[];
  /** Pads that were skipped: which, and what to mend. */
  readonly faults: readonly { readonly index: number; readonly serial: string | undefined; readonly message: string }[];
};

const serialOf = (value: unknown): string | undefined => {
  const parsed = z.object({ serial: z.string() }).safeParse(value);
  return parsed.success ? parsed.data.serial : undefined;
};

const wordsOf = (error: z.ZodError): string =>
  error.issues.map((issue) => `${issue.path.join('.') || 'pad'}: ${issue.message}`).join('; ');

/** Null means what a missing field does; in a motor's settings it has a meaning of its own. */
function withoutNulls(value: unknown, key = ''): unknown {
  if (key === 'settings' || typeof value !== 'object' || value === null) return value;
  if (Array.isArray(value)) return value.map((element) => withoutNulls(element));
  const fields = Object.entries(value).filter(([, field]) => field !== null);
  return Object.fromEntries(fields.map(([name, field]) => [name, withoutNulls(field, name)]));
}

/**
 * Reads the pads of a backtest. One bad pad is named and skipped, a serial that comes twice keeps its first; undefined
 * where the value is no array at all. `pumpId` of each context is the serial.
 *
 * @example readPadFile([{ serial: 'MR-000123', timezone: 'America/Phoenix', settings: {} }])?.pads.length // 1
 */
export function readPadFile(value: unknown): PadFile | undefined {
  if (!Array.isArray(value)) return undefined;
  const pads = new Map<string, PumpContext>();
  const faults: { index: number; serial: string | undefined; message: string }[] = [];
  for (const [index, element] of value.entries()) {
    const parsed = BacktestPad.safeParse(withoutNulls(element));
    if (!parsed.success) faults.push({ index, serial: serialOf(element), message: wordsOf(parsed.error) });
    else if (pads.has(parsed.data.serial))
      faults.push({ index, serial: parsed.data.serial, message: 'serial: stands twice' });
    else pads.set(parsed.data.serial, toPumpContext(parsed.data));
  }
  return { pads: [...pads.values()], faults };
}
