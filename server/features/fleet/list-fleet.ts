import type { Context } from '#server/context.ts';
import { listPumpRows, presentPumpRow } from '#server/features/pumps/index.ts';
import { decodeCursor, toPage } from '#server/http/page-cursor.ts';
import type { FleetPage, FleetQuery } from '#shared/contract/http/pumps.ts';
import { listFleetPlaces } from './fleet-read-model.ts';

/** One page of the wall: which pumps, in which order, and the figures over all of them. */
export async function listFleet({ db, actor, now }: Context, query: FleetQuery): Promise<FleetPage> {
  const after = decodeCursor(query.cursor, ['number', 'string', 'string']);
  const { places, totals, matching, areas } = await listFleetPlaces(db, query, after);
  const { items, nextCursor } = toPage(places, query.limit, ({ rank, name, id }) => [rank, name, id]);
  const rows = await listPumpRows(
    db,
    items.map(({ id }) => id),
  );
  const byId = new Map(rows.map((row) => [row.pumpId, presentPumpRow(row, actor)]));
  return {
    items: items.flatMap(({ id }) => byId.get(id) ?? []),
    nextCursor,
    totals,
    matching,
    areas: [...areas],
    serverNow: now,
  };
}
