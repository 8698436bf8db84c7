import type { Context } from '#server/context.ts';
import { notFound } from '#server/errors.ts';
import { decodeCursor, toPage } from '#server/http/page-cursor.ts';
import type { ProgramsQuery } from '#shared/contract/http/energy-programs.ts';
import { presentAdvice, presentProgram } from './present-advice.ts';
import { findProgramRecord, listProgramRecords } from './program-read-model.ts';

/** Programs and clock windows that cost too much, with what would do the same for less. */
export async function listPrograms({ db, actor, now }: Context, query: ProgramsQuery) {
  const after = decodeCursor(query.cursor, ['number', 'string', 'string']);
  const { rows, ...counts } = await listProgramRecords(db, actor.companyId, query, after);
  const { items, nextCursor } = toPage(rows, query.limit, ({ rank, padName, pumpId }) => [rank, padName, pumpId]);
  return { items: items.map(presentProgram), nextCursor, ...counts, serverNow: now };
}

/** The advice for a pump's program as it was last worked out. */
export async function readAdvice({ db, now }: Context, pumpId: string) {
  const { isPump, record } = await findProgramRecord(db, pumpId);
  if (!isPump) throw notFound('pump');
  return { advice: record === undefined ? null : presentAdvice(record), serverNow: now };
}
