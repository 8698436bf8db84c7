import type { Evidence } from '#shared/domain/detectors/detector.ts';
import { bothDegrees } from '#shared/domain/wording/both-degrees.ts';
import { formatDuration } from '#shared/domain/wording/format-duration.ts';
import { formatInstant } from './format-instant.ts';

/** One piece of evidence in words: `measured speed` · `1,690 rpm`. */
export type EvidenceLine = { readonly name: string; readonly value: string };

const number = (value: number, digits = Math.abs(value) < 10 ? 1 : 0): string =>
  new Intl.NumberFormat('en-US', { maximumFractionDigits: digits }).format(value);

type Unit = { readonly suffix: RegExp; readonly noun: string; readonly write: (value: number, zone: string) => string };

/** The unit in which a number's name ends, and how a person reads it. */
const UNITS: readonly Unit[] = [
  { suffix: /Rpm$/, noun: 'speed', write: (value) => `${number(value, 0)} rpm` },
  { suffix: /Watts$/, noun: 'watts', write: (value) => `${number(value)} W` },
  { suffix: /Volts$/, noun: 'voltage', write: (value) => `${number(value)} V` },
  { suffix: /Celsius$/, noun: 'temperature', write: bothDegrees },
  {
    suffix: /Seconds$/,
    noun: '',
    write: (value) => (value < 120 ? `${number(value, 0)} s` : formatDuration(value / 60)),
  },
  { suffix: /Minutes$/, noun: '', write: (value) => formatDuration(value) },
  { suffix: /Hours$/, noun: '', write: (value) => formatDuration(value * 60) },
  { suffix: /Days$/, noun: '', write: (value) => `${number(value, 0)} d` },
  { suffix: /Gpm$/, noun: 'flow', write: (value) => `${number(value)} gpm` },
  { suffix: /(Share|Fraction|Ratio)$/, noun: 'share', write: (value) => `${number(value * 100, 0)} %` },
  { suffix: /(At|Since|From|Until)$/, noun: '', write: (value, zone) => formatInstant(value, zone) },
];

/** Anything that is an instant is later than this (2001): smaller numbers under such a name are something else. */
const EARLIEST_INSTANT_MS = 1_000_000_000_000;

/**
 * Evidence as a person reads it, each number with its unit, instants in the pad's own zone. Empty fields are left out.
 *
 * @example describeEvidence({ measuredRpm: 1690 }, 'America/Phoenix') // [{ name: 'measured speed', value: '1,690 rpm' }]
 */
export function describeEvidence(evidence: Evidence, zone: string): EvidenceLine[] {
  return Object.entries(evidence).flatMap(([key, value]) => {
    if (value === null || value === '') return [];
    if (typeof value === 'boolean') return [{ name: inWords(key), value: value ? 'yes' : 'no' }];
    if (typeof value === 'string') return [{ name: inWords(key), value }];
    return [typeof value === 'number' ? describeNumber(key, value, zone) : describeList(key, value, zone)];
  });
}

function describeNumber(key: string, value: number, zone: string): EvidenceLine {
  const unit = UNITS.find(({ suffix }) => suffix.test(key));
  const isInstant = unit?.suffix.test('At') === true;
  if (unit === undefined || (isInstant && value < EARLIEST_INSTANT_MS))
    return { name: inWords(key), value: number(value) };
  const stem = isInstant ? key : key.replace(unit.suffix, '');
  return { name: [inWords(stem), unit.noun].filter((word) => word !== '').join(' '), value: unit.write(value, zone) };
}

function describeList(key: string, values: readonly (number | string)[], zone: string): EvidenceLine {
  const lines = values.map((value) => (typeof value === 'number' ? describeNumber(key, value, zone) : { value }));
  return { name: inWords(key), value: lines.map(({ value }) => value).join(', ') };
}

/** `sinceStart` → `since start`. */
function inWords(key: string): string {
  return key.replace(/([a-z0-9])([A-Z])/g, '$1 $2').toLowerCase();
}
