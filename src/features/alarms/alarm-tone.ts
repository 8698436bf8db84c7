import type { Priority } from '#shared/domain/detectors/detector.ts';

/** Utility names of a priority's colour, for words, frames and grounds. */
export const ALARM_TONE: Readonly<
  Record<Priority, { readonly text: string; readonly border: string; readonly ground: string }>
> = {
  urgent: { text: 'text-p1', border: 'border-p1', ground: 'bg-p1-ground' },
  soon: { text: 'text-p2', border: 'border-p2', ground: 'bg-p2-ground' },
  note: { text: 'text-p3', border: 'border-p3', ground: 'bg-p3-ground' },
};
