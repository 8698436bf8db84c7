import type { MotorSettings } from '../control/motor-settings.ts';
import { DAY_MINUTES } from '../time/local-time.ts';

const KEYS = ['inputs', 'program', 'prime', 'timed', 'freeze', 'maxRpm', 'minRpm'] as const;
export type SettingsKey = (typeof KEYS)[number];

/**
 * The settings in which a motor's report differs from what was commissioned, by name. What was not reported differs in
 * nothing; a missing input counts as not used.
 *
 * @example listChangedSettings({ maxRpm: 3000 }, settings) // ['maxRpm']
 */
export function listChangedSettings(
  reported: Partial<MotorSettings>,
  commissioned: MotorSettings,
): readonly SettingsKey[] {
  return KEYS.filter((key) => reported[key] !== undefined && plain(reported, key) !== plain(commissioned, key));
}

function plain(settings: Partial<MotorSettings>, key: SettingsKey): string {
  if (key === 'program') return JSON.stringify((settings.program ?? []).map(plainEntry).sort());
  if (key !== 'inputs') return JSON.stringify(sorted(settings[key]));
  const inputs = [...(settings.inputs ?? [])];
  while (inputs.length > 0 && (inputs.at(-1) ?? null) === null) inputs.pop();
  return JSON.stringify(inputs);
}

/** Entries in any order, and midnight as the end of the day or the beginning of the next, are the same program. */
function plainEntry({ days, fromMinute, toMinute, rpm }: MotorSettings['program'][number]): string {
  return JSON.stringify([days, fromMinute, toMinute % DAY_MINUTES, rpm]);
}

/** Two reports of the same settings may write their fields in another order. */
function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted);
  if (typeof value !== 'object' || value === null) return value;
  return Object.entries(value)
    .sort(([left], [right]) => (left < right ? -1 : 1))
    .map(([key, entry]) => [key, sorted(entry)]);
}
