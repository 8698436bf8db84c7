import type { MotorSettings } from '../control/motor-settings.ts';
import { isRecord, type Json } from '../detectors/plain-state.ts';

const KEYS = ['inputs', 'program', 'prime', 'timed', 'freeze', 'maxRpm', 'minRpm'] as const;

/** Settings as plain JSON. */
export function saveSettings(settings: Partial<MotorSettings>): Json {
  return parseJson(settings);
}

/**
 * What `saveSettings` wrote. It was validated when it came over the wire, so only its outline is looked at again.
 *
 * @example restoreSettings({ maxRpm: 3450 }) // { maxRpm: 3450 }
 */
export function restoreSettings(saved: unknown): Partial<MotorSettings> {
  if (!isRecord(saved)) return {};
  const known = Object.fromEntries(KEYS.filter((key) => saved[key] !== undefined).map((key) => [key, saved[key]]));
  return isOutline(known) ? (known as Partial<MotorSettings>) : {};
}

function isOutline({
  inputs,
  program,
  prime,
  timed,
  freeze,
  maxRpm,
  minRpm,
}: Readonly<Record<string, unknown>>): boolean {
  const lists = [inputs, program].every((list) => list === undefined || Array.isArray(list));
  const records = [prime, timed, freeze].every((record) => record === undefined || record === null || isRecord(record));
  return lists && records && [maxRpm, minRpm].every((rpm) => rpm === undefined || typeof rpm === 'number');
}

function parseJson(settings: Partial<MotorSettings>): Json {
  return JSON.parse(JSON.stringify(settings)) as Json;
}
