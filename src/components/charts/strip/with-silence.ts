import type { Run } from '#shared/contract/http/runs.ts';

/**
 * Runs of a pump that has gone silent: nobody knows whether the run that was open then still goes on, so it ends where
 * the silence began, and what follows is no data. Runs that say so already, those of a pump that is heard, and
 * those that have not come yet stay.
 */
export function withSilence(runs: readonly Run[] | undefined, silentSince: number | null): readonly Run[] | undefined {
  const open = runs?.at(-1);
  if (runs === undefined || open === undefined) return runs;
  if (silentSince === null || open.to !== null || open.source === 'no-data' || open.from >= silentSince) return runs;
  return [
    ...runs.slice(0, -1),
    { ...open, to: silentSince },
    {
      ...open,
      from: silentSince,
      source: 'no-data',
      expectedSource: 'no-data',
      closedInputs: 0,
      activeInput: 0,
      meanRpm: 0,
      meanWatts: 0,
      wattHours: 0,
      coveredMs: 0,
      expectedRpm: 0,
      flags: [],
    },
  ];
}
