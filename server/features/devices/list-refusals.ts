import type { Context } from '#server/context.ts';
import { decodeCursor, toPage } from '#server/http/page-cursor.ts';
import { listRefusalRows } from './device-read-model.ts';
import { getDevice } from './get-device.ts';

/** What was refused from a device and why, newest first. */
export async function listRefusals(
  context: Context,
  query: { readonly deviceId: string; readonly cursor?: string | undefined; readonly limit: number },
) {
  const device = await getDevice(context, query.deviceId);
  const rows = await listRefusalRows(context.db, device.id, query.limit, decodeCursor(query.cursor, ['number']));
  const page = toPage(rows, query.limit, (row) => [row.id]);
  return {
    items: page.items.map(({ receivedAt, reason, detail, sample }) => ({ receivedAt, reason, detail, sample })),
    nextCursor: page.nextCursor,
  };
}
