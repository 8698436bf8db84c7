import type { StripWindow } from './strip-run.ts';

/** A letter of the figures' font at 13 px, and the handle's own padding. */
const LETTER = 8;
const PADDING = 14;

/** Where the cursor's handle lies on a track, px. */
export type HandleBox = { readonly x: number; readonly left: number; readonly right: number };

/** Where the cursor rests when nobody points: now, or the end that is nearer to it. */
export const restingAt = (now: number, { from, until }: StripWindow): number =>
  Math.min(Math.max(now, from), until - 1);

/**
 * The room a handle with so many letters takes: right of its instant, turned to the left where it would leave the track.
 *
 * @example handleBox(0, { from: 0, until: 100 }, 800, 7) // { x: 0, left: 0, right: 70 }
 */
export function handleBox(at: number, window: StripWindow, width: number, letters: number): HandleBox {
  const x = ((at - window.from) / (window.until - window.from)) * width;
  const own = letters * LETTER + PADDING;
  return x + own > width ? { x, left: x - own, right: x } : { x, left: x, right: x + own };
}
