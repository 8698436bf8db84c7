import type { PumpDetail, PumpLive, Strip } from '#shared/contract/http/pumps.ts';
import type { LiveTable } from '#src/lib/live/live-table.ts';
import { pumpQueries } from './pump-queries.ts';
import { upsertRun } from './upsert-run.ts';

/** News of pumps and runs, written into the pump's page and into every strip that shows the pump. */
export const pumpNews: LiveTable = {
  pumps: (client, pumps) => {
    for (const live of pumps) {
      client.setQueryData<PumpDetail>(pumpQueries.detail(live.pumpId).queryKey, (detail) => patchDetail(detail, live));
    }
  },
  runs: (client, runs) => {
    for (const { pumpId, run } of runs) {
      client.setQueriesData<Strip>({ queryKey: pumpQueries.strips(pumpId) }, (strip) =>
        strip === undefined ? strip : { ...strip, runs: upsertRun(strip.runs, run) },
      );
    }
  },
};

const patchDetail = (detail: PumpDetail | undefined, live: PumpLive): PumpDetail | undefined =>
  detail === undefined ? undefined : { ...detail, ...live };
