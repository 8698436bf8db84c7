const HOUR_MS = 3_600_000;
export const DAY_MS = 24 * HOUR_MS;

/** Lengths that a person can name, ms; between them a chart of a week and one of eight days look alike. */
const NAMED_MS = [
  ...[10, 15, 20, 30, 60, 120, 300, 600, 900, 1200, 1800].map((seconds) => seconds * 1000),
  ...[1, 2, 3, 4, 6].map((hours) => hours * HOUR_MS),
];

/**
 * How long one point of a chart lasts, ms; 0 = every reading by itself, where there are no more than points. Beyond six
 * hours a point is a local day or some of them: a year is read by its days.
 *
 * @example chooseBucketMs({ from: 0, until: 86_400_000 }, 1000, 10_000) // 120000
 */
export function chooseBucketMs(
  { from, until }: { readonly from: number; readonly until: number },
  width: number,
  intervalMs: number,
): number {
  const perPoint = (until - from) / width;
  if (perPoint <= intervalMs) return 0;
  return NAMED_MS.find((ms) => ms >= perPoint) ?? Math.ceil(perPoint / DAY_MS) * DAY_MS;
}
