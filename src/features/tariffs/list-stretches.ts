import { HOURS, type MatrixDraft } from './tariff-draft.ts';

/** Hours of some months alike that have one period: both months counted, `to` is the hour before which it ends. */
export type Stretch = {
  readonly fromMonth: number;
  readonly toMonth: number;
  readonly from: number;
  readonly to: number;
  readonly period: number | null;
};

function stretchesOfMonth(hours: readonly (number | null)[]): Pick<Stretch, 'from' | 'to' | 'period'>[] {
  const stretches: { from: number; to: number; period: number | null }[] = [];
  for (let hour = 0; hour < HOURS; hour += 1) {
    const period = hours[hour] ?? null;
    const last = stretches.at(-1);
    if (last !== undefined && last.period === period) last.to = hour + 1;
    else stretches.push({ from: hour, to: hour + 1, period });
  }
  return stretches;
}

/**
 * A matrix in words: months that are alike and follow one another together, each with its stretches of hours.
 *
 * @example listStretches(matrixOfOnePrice) // [{ fromMonth: 0, toMonth: 11, from: 0, to: 24, period: 0 }]
 */
export function listStretches(matrix: MatrixDraft): Stretch[] {
  const groups: { fromMonth: number; toMonth: number; hours: readonly (number | null)[] }[] = [];
  for (const [month, hours] of matrix.entries()) {
    const last = groups.at(-1);
    if (last?.hours.every((period, hour) => period === hours[hour])) last.toMonth = month;
    else groups.push({ fromMonth: month, toMonth: month, hours });
  }
  return groups.flatMap(({ fromMonth, toMonth, hours }) =>
    stretchesOfMonth(hours).map((stretch) => ({ fromMonth, toMonth, ...stretch })),
  );
}
