/**
 * Degrees Celsius in degrees Fahrenheit, a temperature, not a difference.
 *
 * @example celsiusToFahrenheit(4.4) // 39.92
 */
export function celsiusToFahrenheit(celsius: number): number {
  return celsius * 1.8 + 32;
}

/**
 * Degrees Fahrenheit in degrees Celsius, a temperature, not a difference.
 *
 * @example fahrenheitToCelsius(40) // 4.444…
 */
export function fahrenheitToCelsius(fahrenheit: number): number {
  return (fahrenheit - 32) / 1.8;
}
