import { HOUR_MS, MINUTE_MS } from '#shared/domain/time/local-time.ts';
import type { StripWindow } from './strip-run.ts';

const STEP_MS = 5 * MINUTE_MS;

const clamp = (at: number, { from, until }: StripWindow) => Math.min(Math.max(at, from), until - 1);

/**
 * Where a key moves the cursor to; undefined for a key that does not move it. Arrows move five minutes, with Shift or
 * Page keys an hour; Home and End go to the ends; the first move starts from `start`, which is now where now is shown.
 */
export function moveCursor(
  key: string,
  shift: boolean,
  at: number | undefined,
  window: StripWindow,
  start: number,
): number | undefined {
  const step = shift ? HOUR_MS : STEP_MS;
  const here = at ?? start;
  const moves: Readonly<Record<string, number>> = {
    ArrowLeft: here - step,
    ArrowRight: here + step,
    ArrowDown: here - step,
    ArrowUp: here + step,
    PageDown: here - HOUR_MS,
    PageUp: here + HOUR_MS,
    Home: window.from,
    End: window.until - 1,
  };
  const target = moves[key];
  return target === undefined ? undefined : clamp(target, window);
}
