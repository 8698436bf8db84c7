/** The k of one day (ft/gpm²) with its sigma. `day` counts days from any start. */
export type DayK = { readonly day: number; readonly k: number; readonly sigmaK: number };

/**
 * How k moves. Shares are of k itself: 0.02 a day is two per cent a day. `rise` is from the first day to the last along
 * the fitted line; a rise means that filter or pipes hold the water back more.
 */
export type SystemTrend =
  | {
      readonly kind: 'trend';
      readonly days: number;
      readonly sharePerDay: number;
      readonly sigmaSharePerDay: number;
      readonly riseShare: number;
      readonly direction: 'rising' | 'falling' | 'steady';
    }
  | { readonly kind: 'cannot-tell'; readonly because: 'too-few-days' };

/** Fewer days than this make no trend; common practice. */
const FEWEST_DAYS = 5;
/** A slope is a trend beyond two of its sigmas. */
const TREND_SIGMAS = 2;

/**
 * The trend of k over days since the last cleaning, as a straight line through ln k by weighted least squares. The
 * scatter of the days about it sets the sigma: the meter's own error is the same each day and cancels. Days that are
 * not finite or not above 0 are left out; fewer than five cannot tell.
 *
 * @example findSystemTrend(days) // { kind: 'trend', days: 21, sharePerDay: 0.011, direction: 'rising', … }
 * Source: weighted least squares of a straight line.
 */
export function findSystemTrend(days: readonly DayK[]): SystemTrend {
  const usable = days.filter(
    ({ day, k, sigmaK }) => Number.isFinite(day) && k > 0 && sigmaK > 0 && Number.isFinite(k / sigmaK),
  );
  const rows = usable.map(({ day, k, sigmaK }) => ({ x: day, y: Math.log(k), weight: (k / sigmaK) ** 2 }));
  const total = rows.reduce((sum, row) => sum + row.weight, 0);
  const meanX = rows.reduce((sum, row) => sum + row.weight * row.x, 0) / total;
  const meanY = rows.reduce((sum, row) => sum + row.weight * row.y, 0) / total;
  const spread = rows.reduce((sum, row) => sum + row.weight * (row.x - meanX) ** 2, 0);
  if (new Set(rows.map((row) => row.x)).size < FEWEST_DAYS || !Number.isFinite(spread))
    return { kind: 'cannot-tell', because: 'too-few-days' };

  const sharePerDay = rows.reduce((sum, row) => sum + row.weight * (row.x - meanX) * (row.y - meanY), 0) / spread;
  const left = rows.reduce((sum, row) => sum + row.weight * (row.y - meanY - sharePerDay * (row.x - meanX)) ** 2, 0);
  const sigmaSharePerDay = Math.sqrt(left / (rows.length - 2) / spread);
  const length = Math.max(...rows.map((row) => row.x)) - Math.min(...rows.map((row) => row.x));
  // Rounding alone must not make a trend of days that are all alike.
  const clear = Math.abs(sharePerDay) > TREND_SIGMAS * sigmaSharePerDay && Math.abs(sharePerDay * length) > 1e-9;
  const direction = !clear ? 'steady' : sharePerDay > 0 ? 'rising' : 'falling';
  return {
    kind: 'trend',
    days: rows.length,
    sharePerDay,
    sigmaSharePerDay,
    riseShare: Math.expm1(sharePerDay * length),
    direction,
  };
}
