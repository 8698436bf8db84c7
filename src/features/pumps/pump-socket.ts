import type { FleetPage, PumpDetail, PumpLive, Strip } from '#shared/contract/http/pumps.ts';
import type { LiveTable } from '#src/lib/live/live-table.ts';
import { readUnderwayAgain } from '#src/lib/live/read-again.ts';
import { pumpQueries } from './pump-queries.ts';
import { upsertRun } from './upsert-run.ts';

/** News of pumps and runs, written into the pump's page and into every strip that shows the pump. */
export const pumpNews: LiveTable = {
  pumps: (client, pumps) => {
    const news = new Map(pumps.map((live) => [live.pumpId, live]));
    for (const [pumpId, live] of news) {
      client.setQueryData<PumpDetail>(
        pumpQueries.detail(pumpId).queryKey,
        (detail) => detail && { ...detail, ...live },
      );
    }
    client.setQueryData<FleetPage>(pumpQueries.mine().queryKey, (page) => page && patchMine(page, news));
  },
  runs: (client, runs) => {
    for (const { pumpId, run } of runs) {
      client.setQueriesData<Strip>({ queryKey: pumpQueries.strips(pumpId) }, (strip) =>
        strip === undefined ? strip : { ...strip, runs: upsertRun(strip.runs, run) },
      );
      // A run that has ended is not told of again.
      readUnderwayAgain(client, pumpQueries.strips(pumpId));
    }
  },
  alarms: (client, alarms) => {
    for (const { pumpId } of alarms)
      if (pumpId !== null) readUnderwayAgain(client, pumpQueries.detail(pumpId).queryKey);
  },
};

const patchMine = (page: FleetPage, news: ReadonlyMap<string, PumpLive>): FleetPage => ({
  ...page,
  items: page.items.map((row) => ({ ...row, ...news.get(row.pumpId) })),
});
