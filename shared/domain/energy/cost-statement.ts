import type { CalendarMonth } from './calendar-month.ts';
import { apportionMinorUnits, type Micros } from './money.ts';
import type { DemandLine } from './price-demand.ts';
import type { PricedEnergy } from './price-energy.ts';
import type { FixedLine } from './price-fixed.ts';
import type { Tariff } from './tariff.ts';

/** A line of a statement. `quantity` is kWh, kW or days by its kind; `minorUnits` are whole cents. */
export type CostLine = {
  readonly kind: 'energy' | 'demand' | 'fixed';
  readonly month: CalendarMonth;
  readonly period: number | 'flat' | undefined;
  readonly quantity: number;
  readonly minorUnits: number;
};

/** What was used and what it costs. The lines add up to the total to the cent. */
export type CostStatement = {
  readonly currency: string;
  readonly lines: readonly CostLine[];
  readonly kwh: number;
  readonly minorUnits: number;
};

type OpenLine = Omit<CostLine, 'minorUnits'> & { readonly micros: Micros };

/**
 * Draws priced energy, demand and fixed charges up as one statement in whole minor units: the sum is rounded once, half
 * away from zero, and the lines share it by largest remainder, so that they add up to it. undefined where a price is
 * not finite.
 *
 * @example stateCost(tariff, priced, [], [])?.minorUnits // 6160
 */
export function stateCost(
  tariff: Pick<Tariff, 'currency'>,
  energy: PricedEnergy,
  demand: readonly DemandLine[],
  fixed: readonly FixedLine[],
): CostStatement | undefined {
  const open: OpenLine[] = [
    ...energy.lines.map(({ month, period, kwh, micros }) => ({
      kind: 'energy' as const,
      month,
      period,
      quantity: kwh,
      micros,
    })),
    ...demand.map(({ month, period, kilowatts, micros }) => ({
      kind: 'demand' as const,
      month,
      period,
      quantity: kilowatts,
      micros,
    })),
    ...fixed.map(({ month, days, micros }) => ({
      kind: 'fixed' as const,
      month,
      period: undefined,
      quantity: days,
      micros,
    })),
  ];
  const minorUnits = apportionMinorUnits(
    open.map(({ micros }) => micros),
    tariff.currency,
  );
  if (minorUnits === undefined) return undefined;
  return {
    currency: tariff.currency,
    lines: open.map(({ micros: _, ...line }, index) => ({ ...line, minorUnits: minorUnits[index] ?? 0 })),
    kwh: energy.kwh,
    minorUnits: minorUnits.reduce((sum, units) => sum + units, 0),
  };
}
