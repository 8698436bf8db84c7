import type { MotorSettings, MotorTraits } from '../control/motor-settings.ts';
import type { InputWindow } from '../control/window-spans.ts';
import { marginalMicros } from '../energy/charge-tiers.ts';
import { periodAt, type Tariff } from '../energy/tariff.ts';
import type { SystemCurve } from '../hydraulics/system-curve.ts';
import type { WetEndCurve } from '../hydraulics/wet-end-curve.ts';
import { buildDayGrid, inputSpeeds } from './day-grid.ts';
import { buildDayProblem, type DayTerms } from './day-problem.ts';
import type { DayCase } from './find-unmet-needs.ts';
import type { PadNeeds } from './pad-needs.ts';
import { layOutLimits } from './speed-limits.ts';
import { listSpeedOptions, SPEED_STEP_RPM, type SpeedOption, speedOptionAt } from './speed-option.ts';
import type { WeekMinutes } from './week-minutes.ts';

/** What the advisor is asked: a motor, its clocks, its water, what the pad needs, and what a kWh costs this month. */
export type AdviceRequest = {
  readonly settings: MotorSettings;
  readonly traits: MotorTraits;
  /** Recorded and learnt windows of the inputs: in these the program has no say. */
  readonly windows: readonly InputWindow[];
  readonly curve: WetEndCurve;
  readonly system: SystemCurve;
  readonly needs: PadNeeds;
  readonly entryLimit: number;
  /** The keypad's step; 50 rpm unless it is known. */
  readonly speedStepRpm?: number | undefined;
  readonly tariff: Tariff;
  /** 0 = January: prices go by it, and the needs are those of its season. */
  readonly month: number;
  /** kWh that the meter has used a month before the pump, by period: it pays the price of the tier above. */
  readonly otherKwhByPeriod?: readonly number[] | undefined;
};

const ANY_DAYS = 30;

/** The price of the next kWh in each hour of a month, micros, tiers above what the meter uses before the pump. */
function pricesOf({ tariff, month, otherKwhByPeriod = [] }: AdviceRequest): DayTerms['priceAt'] {
  const adjustment = tariff.monthlyAdjustmentMicros?.[month] ?? 0;
  const prices = tariff.energy.periods.map(
    (tiers, period) => marginalMicros(tiers, otherKwhByPeriod[period] ?? 0, ANY_DAYS) + adjustment,
  );
  return (weekday, hour) => prices[periodAt(tariff.energy, month, weekday, hour) ?? 0] ?? 0;
}

/** Remembers what each speed moves and draws: a week asks for the same few thousands of times. */
function rememberSpeeds(request: AdviceRequest): DayTerms['speedAt'] {
  const known = new Map<number, SpeedOption | undefined>();
  return (rpm) => {
    if (!known.has(rpm)) known.set(rpm, speedOptionAt(request.curve, request.system, rpm));
    return known.get(rpm);
  };
}

/** Draws up what every day of a request shares. */
export function termsOf(request: AdviceRequest): DayTerms {
  const { settings, curve, system, needs, speedStepRpm = SPEED_STEP_RPM } = request;
  const speedAt = rememberSpeeds(request);
  const option = settings.prime === null ? undefined : speedAt(settings.prime.rpm);
  return {
    speeds: listSpeedOptions(curve, system, settings.minRpm, settings.maxRpm, speedStepRpm),
    speedAt,
    standbyWatts: curve.standbyWatts,
    prime: option === undefined || settings.prime === null ? undefined : { option, seconds: settings.prime.seconds },
    priceAt: pricesOf(request),
    gallonsPerDay: needs.gallonsPerDay,
    hours: needs.hours,
  };
}

/** The weekdays of a request, Monday first, laid out for the search, and the inputs' speeds through the week. */
export function layOutDays(
  request: AdviceRequest,
  terms: DayTerms,
): { readonly days: readonly DayCase[]; readonly inputs: WeekMinutes } {
  const inputs = inputSpeeds(request.settings, request.traits, request.windows);
  const limits = layOutLimits(request.needs, terms.speeds);
  const days = Array.from({ length: 7 }, (_, weekday) => {
    const grid = buildDayGrid(weekday, inputs, limits);
    const prices = Array.from({ length: 24 }, (__, hour) => terms.priceAt(weekday, hour));
    return { weekday, grid, prices, problem: buildDayProblem(terms, weekday, grid, inputs) };
  });
  return { days, inputs };
}
