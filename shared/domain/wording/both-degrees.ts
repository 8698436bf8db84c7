import { celsiusToFahrenheit } from '#shared/units/temperature.ts';

const write = (value: number, digits: number): string =>
  new Intl.NumberFormat('en-US', { maximumFractionDigits: digits }).format(value).replace(/^-(?=0$)/, '');

/**
 * A temperature in degrees Fahrenheit and Celsius, for words that people of either habit read: a title, a mail.
 *
 * @example bothDegrees(0.5) // '33 °F (0.5 °C)'
 */
export const bothDegrees = (celsius: number): string =>
  `${write(celsiusToFahrenheit(celsius), 0)} °F (${write(celsius, Math.abs(celsius) < 10 ? 1 : 0)} °C)`;
