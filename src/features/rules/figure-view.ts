import { type FigureLimits, limitsOfFigure } from '#shared/domain/detectors/figure-limits.ts';
import { celsiusToFahrenheit, fahrenheitToCelsius } from '#shared/units/temperature.ts';
import type { UnitSystem } from '#shared/units/unit-system.ts';
import { t } from '#src/lib/messages/rules-words.ts';

/** How a figure is shown and typed: its stored value is so many of `size`, counted from `zero`. */
export type FigureForm = {
  readonly size: number;
  /** What is typed for a stored nothing: 32 for degrees Fahrenheit. */
  readonly zero: number;
  readonly digits: number;
  readonly unit: 's' | 'min' | 'h' | 'd' | 'celsius' | 'fahrenheit' | 'speed' | 'percent' | 'times';
  readonly limits: FigureLimits;
};

const UNITS = {
  s: 's',
  min: 'min',
  h: 'h',
  d: 'd',
  rpm: 'speed',
  share: 'percent',
  times: 'times',
} as const;

/** Degrees between two temperatures, not a temperature: 5 °C more are 9 °F more, not 41. */
const DEGREES_BETWEEN = /^(sensorTolerance|deadband|hotMargin)Celsius$/;

/** One degree Fahrenheit, in degrees Celsius. */
const FAHRENHEIT_DEGREE = fahrenheitToCelsius(33) - fahrenheitToCelsius(32);

function formOfDegrees(figure: string, limits: FigureLimits, system: UnitSystem): FigureForm {
  if (system === 'si') return { size: 1, zero: 0, digits: 2, unit: 'celsius', limits };
  const zero = DEGREES_BETWEEN.test(figure) ? 0 : celsiusToFahrenheit(0);
  return { size: FAHRENHEIT_DEGREE, zero, digits: 2, unit: 'fahrenheit', limits };
}

/**
 * The form of a figure, chosen by its usual value and the reader's units: 1200 s are typed as 20 min.
 *
 * @example formOfFigure('delaySeconds', 1200, 'us').unit // 'min'
 */
export function formOfFigure(figure: string, usual: number, system: UnitSystem): FigureForm {
  const limits = limitsOfFigure(figure);
  if (limits.unit === '°C') return formOfDegrees(figure, limits, system);
  if (limits.unit === 'share') return { size: 0.01, zero: 0, digits: 1, unit: 'percent', limits };
  const seconds = limits.unit === 's' ? usual : limits.unit === 'min' ? usual * 60 : 0;
  const own = limits.unit === 's' ? 1 : 60;
  if (seconds >= 7200 && seconds % 3600 === 0) return { size: 3600 / own, zero: 0, digits: 2, unit: 'h', limits };
  if (limits.unit === 's' && seconds >= 120 && seconds % 60 === 0)
    return { size: 60, zero: 0, digits: 2, unit: 'min', limits };
  return { size: 1, zero: 0, digits: limits.whole ? 0 : 2, unit: UNITS[limits.unit], limits };
}

const plain = (value: number, digits: number): string => `${Number(value.toFixed(digits))}`;

/** A stored value as it is typed, without its unit. */
export const typedFigure = (value: number, { size, zero, digits }: FigureForm): string =>
  plain(value / size + zero, digits);

/** A stored value with its unit. */
export function sayFigure(value: number, form: FigureForm): string {
  const typed = typedFigure(value, form);
  // 4.4 °C are 39.92 °F to a program and 39.9 to a person.
  const digits = form.unit === 'fahrenheit' ? 1 : form.digits;
  const number = new Intl.NumberFormat('en', { maximumFractionDigits: digits }).format(Number(typed));
  return form.unit === 'd' ? t('unit.d', { count: Number(typed), number }) : t(`unit.${form.unit}`, { number });
}

/**
 * What was typed as a stored value; undefined where it is no number or not allowed.
 *
 * @example parseFigure('20', formOfFigure('delaySeconds', 1200, 'us')) // 1200
 */
export function parseFigure(text: string, { size, zero, limits }: FigureForm): number | undefined {
  const typed = text.trim().replace(',', '.');
  if (!/^\d+(\.\d+)?$/.test(typed)) return undefined;
  const value = Number(((Number(typed) - zero) * size).toPrecision(12));
  if (limits.whole && !Number.isInteger(value)) return undefined;
  return value >= limits.least && value <= limits.most ? value : undefined;
}
