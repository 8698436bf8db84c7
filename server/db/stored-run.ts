import type { Run } from '#shared/domain/runs/run.ts';

/** Columns of `runs` that make a StoredRun. */
export const RUN_COLUMNS = `round(date_part('epoch', from_at) * 1000) as "from", round(date_part('epoch', to_at) * 1000) as "to",
  source, expected_source as "expectedSource", closed_inputs as "closedInputs", active_input as "activeInput",
  expected_rpm as "expectedRpm", mean_rpm as "meanRpm", mean_watts as "meanWatts", watt_hours as "wattHours",
  covered_ms::float8 as "coveredMs", gallons, gallons_sigma as "gallonsSigma", flags`;

export type StoredRun = Omit<Run, 'to' | 'gallons' | 'gallonsSigma'> & {
  readonly to: number | null;
  readonly gallons: number | null;
  readonly gallonsSigma: number | null;
};

/** A stored run as the domain knows it. */
export const toRun = ({ to, gallons, gallonsSigma, ...run }: StoredRun): Run => ({
  ...run,
  to: to ?? undefined,
  gallons: gallons ?? undefined,
  gallonsSigma: gallonsSigma ?? undefined,
});
