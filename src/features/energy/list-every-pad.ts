import { fleetEnergyEndpoints, type PadMonth } from '#shared/contract/http/energy-fleet.ts';
import { call } from '#src/lib/api/api-client.ts';
import type { PadFilter } from './energy-queries.ts';
import type { MonthText } from './local-month.ts';

const LARGEST_PAGE = 200;

/** Every pad of a month in its order, page after page: for a file. */
export async function listEveryPad(month: MonthText, filter: PadFilter): Promise<PadMonth[]> {
  const pads: PadMonth[] = [];
  let cursor: string | undefined;
  do {
    const page = await call(fleetEnergyEndpoints.pads, { query: { month, ...filter, cursor, limit: LARGEST_PAGE } });
    pads.push(...page.items);
    cursor = page.nextCursor ?? undefined;
  } while (cursor !== undefined);
  return pads;
}
