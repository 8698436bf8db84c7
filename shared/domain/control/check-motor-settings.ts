import { checkNumber, checkNumbers, type NumberFault, type NumberRule } from '../refusal/check-number.ts';
import type { Refusal } from '../refusal/refusal.ts';
import type { MotorSettings, MotorTraits, ProgramEntry } from './motor-settings.ts';

export type MotorSettingsFault =
  | NumberFault
  | 'input-beyond-model'
  | 'not-seven-days'
  | 'no-length'
  | 'least-over-most';

/** No motor in the trade is set beyond this, rpm (the wire's own bound). */
const HIGHEST_RPM = 4000;
const PRIME_SECONDS: NumberRule = { field: 'prime.seconds', unit: 's', least: 1, most: 3600 };
const TIMED_MINUTES: NumberRule = { field: 'timed.minutes', unit: 'min', least: 1, most: 1440 };
const FREEZE_CELSIUS: NumberRule = { field: 'freeze.celsius', unit: '°C', least: -40, most: 40 };

/**
 * Everything that is wrong with what a motor is to be set to, all at once; empty where it can be used. Speeds must
 * lie within the motor's own least and highest, an input needs a terminal on the model (named `inputs[0]` for input
 * 1), and a program entry seven days and a length.
 *
 * @example checkMotorSettings({ ...settings, inputs: [2850, 2400, null, 1800] }, DEFAULT_TRAITS)
 * // [{ reason: 'input-beyond-model', field: 'inputs[3]', allowed: 'no speed: the model has inputs 1 to 3' }]
 */
export function checkMotorSettings(settings: MotorSettings, traits: MotorTraits): Refusal<MotorSettingsFault>[] {
  const limits = checkLimits(settings);
  // Against limits that are wrong themselves every speed would be wrong too.
  const speed = (field: string): NumberRule =>
    limits.length > 0
      ? { field, unit: 'rpm', least: 1, most: HIGHEST_RPM }
      : { field, unit: 'rpm', least: settings.minRpm, most: settings.maxRpm };
  const { prime, timed, freeze } = settings;
  return [
    ...limits,
    ...settings.inputs.flatMap((rpm, index) => checkInput(rpm, index, traits, speed(`inputs[${index}]`))),
    ...settings.program.flatMap((entry, index) => checkProgramEntry(entry, `program[${index}]`, speed)),
    ...checkNumbers([
      ...(prime === null ? [] : pairs([prime.rpm, speed('prime.rpm')], [prime.seconds, PRIME_SECONDS])),
      ...(timed === null ? [] : pairs([timed.rpm, speed('timed.rpm')], [timed.minutes, TIMED_MINUTES])),
      ...(freeze === null ? [] : pairs([freeze.rpm, speed('freeze.rpm')], [freeze.celsius, FREEZE_CELSIUS])),
    ]),
  ];
}

function checkLimits({ minRpm, maxRpm }: MotorSettings): Refusal<MotorSettingsFault>[] {
  const bounds = { unit: 'rpm', least: 1, most: HIGHEST_RPM };
  const faults = [
    ...checkNumber(minRpm, { ...bounds, field: 'minRpm' }),
    ...checkNumber(maxRpm, { ...bounds, field: 'maxRpm' }),
  ];
  if (faults.length > 0 || minRpm < maxRpm) return faults;
  return [{ reason: 'least-over-most', field: 'minRpm', allowed: 'a speed below maxRpm' }];
}

function checkInput(
  rpm: number | null,
  index: number,
  traits: MotorTraits,
  rule: NumberRule,
): Refusal<MotorSettingsFault>[] {
  if (rpm === null) return [];
  if (index < traits.inputCount) return checkNumber(rpm, rule);
  const allowed =
    traits.inputCount === 0 ? 'the model has no inputs' : `the model has inputs 1 to ${traits.inputCount}`;
  return [{ reason: 'input-beyond-model', field: rule.field, allowed: `no speed: ${allowed}` }];
}

function checkProgramEntry(
  { days, fromMinute, toMinute, rpm }: ProgramEntry,
  field: string,
  speed: (field: string) => NumberRule,
): Refusal<MotorSettingsFault>[] {
  const faults: Refusal<MotorSettingsFault>[] = [
    ...checkNumber(fromMinute, { field: `${field}.fromMinute`, unit: 'min', least: 0, most: 1439, whole: true }),
    ...checkNumber(toMinute, { field: `${field}.toMinute`, unit: 'min', least: 1, most: 1440, whole: true }),
    ...checkNumber(rpm, speed(`${field}.rpm`)),
  ];
  if (days.length !== 7)
    faults.push({ reason: 'not-seven-days', field: `${field}.days`, allowed: 'seven flags, Monday first' });
  if (fromMinute === toMinute)
    faults.push({ reason: 'no-length', field: `${field}.toMinute`, allowed: 'another time than fromMinute' });
  return faults;
}

type Pair = readonly [number, NumberRule];

const pairs = (first: Pair, second: Pair): Pair[] => [first, second];
