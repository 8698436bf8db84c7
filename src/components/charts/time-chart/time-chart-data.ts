/** One line of a chart. A `band` is the lowest and highest of each bucket, drawn as a wash behind the line. */
export type ChartLine = {
  readonly label: string;
  readonly values: readonly (number | null)[];
  readonly dashed?: boolean;
  readonly band?: { readonly low: readonly (number | null)[]; readonly high: readonly (number | null)[] };
};

/** Times in ms, a line for each column, `null` where there is a gap. */
export type ChartData = { readonly times: readonly number[]; readonly lines: readonly ChartLine[] };

/** uPlot's own shape: seconds first, then each line, its band's edges after it. */
export function alignColumns({ times, lines }: ChartData): (number | null)[][] {
  const seconds = times.map((at) => at / 1000);
  const columns = lines.flatMap(({ values, band }) =>
    band === undefined ? [[...values]] : [[...values], [...band.high], [...band.low]],
  );
  return [seconds, ...columns];
}

/** The value of each line at the time nearest to an instant, for the words beside the chart. */
export function nearestIndex(times: readonly number[], at: number): number | undefined {
  if (times.length === 0) return undefined;
  let low = 0;
  let high = times.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((times[middle] ?? 0) < at) low = middle + 1;
    else high = middle;
  }
  const before = times[low - 1];
  const after = times[low];
  return before !== undefined && after !== undefined && at - before < after - at ? low - 1 : low;
}
