/**
 * Minutes in words short enough for a row. The sign is dropped: the sentence says slow or fast.
 *
 * @example formatDuration(37) // '37 min'
 * @example formatDuration(100) // '1 h 40'
 * @example formatDuration(2940) // '2 d 1 h'
 */
export function formatDuration(minutes: number): string {
  const whole = Math.round(Math.abs(minutes));
  if (whole < 60) return `${whole} min`;
  const hours = Math.floor(whole / 60);
  const rest = whole % 60;
  if (hours < 24) return rest === 0 ? `${hours} h` : `${hours} h ${String(rest).padStart(2, '0')}`;
  const days = Math.floor(hours / 24);
  return hours % 24 === 0 ? `${days} d` : `${days} d ${hours % 24} h`;
}
