import type { ProgramTimeline } from './program-timeline.ts';

/** The instants (ms) around another at which the program's speed changes; undefined where none is near enough to know. */
export type ProgramEdges = { readonly before: number | undefined; readonly after: number | undefined };

/**
 * The program's edges around an instant, `slotIndex` being the slot that holds it. Where one entry follows another at
 * the same speed there is no edge.
 *
 * @example programEdges(timeline, findSlotIndex(timeline, at), at).after
 */
export function programEdges({ slots }: ProgramTimeline, slotIndex: number, at: number): ProgramEdges {
  let first = slotIndex;
  while (first > 0 && slots[first - 1]?.rpm === slots[first]?.rpm) first -= 1;
  let last = slotIndex;
  while (last + 1 < slots.length && slots[last + 1]?.rpm === slots[last]?.rpm) last += 1;
  const before = first > 0 ? slots[first]?.from : undefined;
  return {
    before: before !== undefined && before <= at ? before : undefined,
    after: last + 1 < slots.length ? slots[last]?.to : undefined,
  };
}
