import { formatDuration } from '#shared/domain/wording/format-duration.ts';

/**
 * A stretch of time in words, seconds included where it is short.
 *
 * @example formatSpan(52_000) // '52 s'
 * @example formatSpan(130_000) // '2 min'
 */
export function formatSpan(ms: number): string {
  const seconds = Math.max(0, Math.round(ms / 1000));
  return seconds < 60 ? `${seconds} s` : formatDuration(seconds / 60);
}
