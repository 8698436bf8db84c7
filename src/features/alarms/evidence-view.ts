import type { Alarm } from '#shared/contract/http/alarms.ts';
import { formatDuration } from '#shared/domain/wording/format-duration.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { listClosed } from '#src/lib/list-closed.ts';
import { isPlainKey, t } from '#src/lib/messages/page-words.ts';

type Evidence = Alarm['evidence'];

/** What the words already say, or what is for machines alone. */
const UNSAID = ['because', 'causes', 'knownFrom', 'saysSource', 'energized', 'connection', 'equipment', 'currency'];

/** A number's unit is the end of its name: how each is written, and the part of the name that is the unit. */
const UNITS: readonly { readonly unit: RegExp; readonly write: (value: number, format: Format) => string }[] = [
  { unit: /rpm$/i, write: (value, format) => format.rpm(value) },
  { unit: /watts$/i, write: (value, format) => format.watts(value) },
  { unit: /minutes$/i, write: (value) => formatDuration(value) },
  { unit: /seconds$/i, write: (value, format) => format.span(value * 1000) },
  { unit: /celsius$/i, write: (value, format) => format.quantity(value, 'temperature') },
  { unit: /volts$/i, write: (value, format) => `${format.number(value)} V` },
  { unit: /(share|drop|rise|saving)$/i, write: (value, format) => `${format.number(value * 100)} %` },
  { unit: /^kwh/i, write: (value, format) => `${format.number(value)} kWh` },
  { unit: /^gallons/i, write: (value, format) => format.quantity(value, 'volume') },
  { unit: /ratio$/i, write: (value, format) => format.number(value, 1) },
  { unit: /closedInputs$/, write: (value) => listClosed(value).join(', ') || t('alarm.now.allOpen') },
];

/** Units that a value carries in the reader's own: `ambientCelsius` must not stand before degrees Fahrenheit. */
const CARRIED = /(Celsius|Seconds|Minutes|Share)$/;

/** `measuredRpm` as "Measured rpm": what a name without words of its own reads like. */
const spellOut = (name: string): string => {
  const words = name
    .replace(CARRIED, '')
    .replaceAll(/([A-Z])/g, ' $1')
    .toLowerCase();
  return words.slice(0, 1).toUpperCase() + words.slice(1);
};

const nameOf = (name: string): string => {
  const key = `evidence.${name}`;
  return isPlainKey(key) ? t(key) : spellOut(name);
};

function writeValue(name: string, value: number | string, { currency }: Evidence, format: Format): string {
  if (typeof value === 'string')
    return /^cost/.test(name) && typeof currency === 'string' ? format.money(value, currency) : value;
  const unit = UNITS.find((each) => each.unit.test(name));
  return unit === undefined ? format.number(value, Number.isInteger(value) ? 0 : 1) : unit.write(value, format);
}

/** The evidence's numbers and words as names and values a person can check against the pad. */
export function listEvidence(evidence: Evidence, format: Format): (readonly [string, string])[] {
  return Object.entries(evidence).flatMap(([name, value]) =>
    UNSAID.includes(name) || (typeof value !== 'number' && typeof value !== 'string') || value === ''
      ? []
      : [[nameOf(name), writeValue(name, value, evidence, format)] as const],
  );
}

/** What the watts would be if all were well, where the rule knows it. */
export const usualWattsOf = ({ primedWatts, usualWatts }: Evidence): number | undefined =>
  [primedWatts, usualWatts].find((value): value is number => typeof value === 'number' && value > 0);
