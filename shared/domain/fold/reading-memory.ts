import { isRecord, type Json } from '../detectors/plain-state.ts';
import { type Reading, SOURCES } from '../readings/reading.ts';

/** A reading as plain JSON. */
export function saveReading(reading: Reading): Json {
  const saved: { [key: string]: Json } = {};
  for (const [key, value] of Object.entries(reading)) if (value !== undefined) saved[key] = value;
  return saved;
}

/**
 * The reading that `saveReading` wrote; undefined where it cannot be read.
 *
 * @example restoreReading({ at: 1 }) // undefined
 */
export function restoreReading(saved: unknown): Reading | undefined {
  if (!isRecord(saved)) return undefined;
  const number = (key: string): number | undefined => {
    const value = saved[key];
    return typeof value === 'number' ? value : undefined;
  };
  const [at, rpm, closedInputs, activeInput, watts] = ['at', 'rpm', 'closedInputs', 'activeInput', 'watts'].map(number);
  if (at === undefined || rpm === undefined || closedInputs === undefined) return undefined;
  if (activeInput === undefined || watts === undefined) return undefined;
  return {
    at,
    rpm,
    closedInputs,
    activeInput,
    watts,
    reportedSource: SOURCES.find((source) => source === saved.reportedSource),
    volts: number('volts'),
    driveCelsius: number('driveCelsius'),
    ambientCelsius: number('ambientCelsius'),
    motorClockMinute: number('motorClockMinute'),
    fault: typeof saved.fault === 'string' ? saved.fault : undefined,
  };
}
