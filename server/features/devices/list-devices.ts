import type { Context } from '#server/context.ts';
import { decodeCursor, toPage } from '#server/http/page-cursor.ts';
import { listDeviceRows } from './device-read-model.ts';
import { presentDevice } from './present-device.ts';

/** One page of the company's devices, by serial. */
export async function listDevices(
  { db }: Context,
  query: { readonly q?: string | undefined; readonly cursor?: string | undefined; readonly limit: number },
) {
  const rows = await listDeviceRows(db, query, decodeCursor(query.cursor, ['string']));
  const page = toPage(rows, query.limit, (row) => [row.serial]);
  return { items: page.items.map(presentDevice), nextCursor: page.nextCursor };
}
