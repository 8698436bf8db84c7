import type { AdviceRequest } from '#shared/domain/advisor/advice-request.ts';
import { DEFAULT_TRAITS } from '#shared/domain/control/motor-settings.ts';
import { TIME_OF_USE } from '#tests/shared/domain/energy/sample-tariffs.ts';
import { fitOrFail, POOL_SHEET } from '#tests/shared/domain/hydraulics/sample-wet-ends.ts';

export const EVERY_DAY = [true, true, true, true, true, true, true];
export const WEEKEND = [false, false, false, false, false, true, true];

/** A pool of 20,000 gallons to turn over once a day in July, run at present for eight hours at full speed. */
export const REQUEST: AdviceRequest = {
  settings: {
    inputs: [2850, null, null],
    program: [{ days: EVERY_DAY, fromMinute: 10 * 60, toMinute: 18 * 60, rpm: 3450 }],
    prime: { rpm: 3450, seconds: 180 },
    timed: null,
    freeze: null,
    maxRpm: 3450,
    minRpm: 600,
  },
  traits: DEFAULT_TRAITS,
  windows: [],
  curve: fitOrFail(POOL_SHEET),
  system: { staticFeet: 0, k: 0.0125 },
  needs: { gallonsPerDay: 20_000, windows: [], quiet: [] },
  entryLimit: 3,
  tariff: TIME_OF_USE,
  month: 6,
};
