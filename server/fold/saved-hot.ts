import type { Json } from '#shared/domain/detectors/plain-state.ts';

/** What is kept in a pump's hot state: the fold's own, and what this folder has to remember beside it. */
export type SavedHot = {
  /** The fold's state, opaque here. */
  readonly fold: unknown;
  /** Device times of readings that came late and whose runs are not corrected yet. */
  readonly lateAt: readonly number[];
  /** The connection that the device last named: the will of an older one says nothing. */
  readonly connection: string | undefined;
};

const NOTHING: SavedHot = { fold: undefined, lateAt: [], connection: undefined };

/** Writes a hot state as JSON text. */
export function encodeHot(fold: Json, { lateAt, connection }: Omit<SavedHot, 'fold'>): string {
  return JSON.stringify({ fold, lateAt, connection });
}

/** Reads a hot state back; what is damaged is forgotten. */
export function readHot(value: unknown): SavedHot {
  if (typeof value !== 'object' || value === null) return NOTHING;
  const fields: { readonly fold?: unknown; readonly lateAt?: unknown; readonly connection?: unknown } = value;
  const lateAt = Array.isArray(fields.lateAt) ? fields.lateAt.filter((at) => Number.isSafeInteger(at)) : [];
  return {
    fold: fields.fold,
    lateAt,
    connection: typeof fields.connection === 'string' ? fields.connection : undefined,
  };
}
