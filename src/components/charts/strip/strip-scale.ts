import type { StripMetrics } from './strip-metrics.ts';
import type { StripWindow } from './strip-run.ts';

export type StripScale = {
  readonly x: (at: number) => number;
  readonly y: (rpm: number) => number;
};

/** Time to x over the width, speed to y between base and top; speeds beyond the top stay at the top. */
export function createStripScale(
  window: StripWindow,
  width: number,
  { top, base }: Pick<StripMetrics, 'top' | 'base'>,
  topRpm: number,
): StripScale {
  const span = Math.max(1, window.until - window.from);
  return {
    x: (at) => ((at - window.from) / span) * width,
    y: (rpm) => base - (Math.min(Math.max(0, rpm), topRpm) / topRpm) * (base - top),
  };
}

/**
 * The instant under an x, kept inside the window.
 *
 * @example instantAt({ from: 0, until: 1000 }, 100, 50) // 500
 */
export function instantAt(window: StripWindow, width: number, x: number): number {
  const share = width <= 0 ? 0 : Math.min(1, Math.max(0, x / width));
  return Math.round(window.from + share * (window.until - window.from));
}
