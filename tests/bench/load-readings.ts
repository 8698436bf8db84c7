/**
 * The text of a message of readings of a steady pump, `stepMs` apart, the last at `until`. The numbers change a little
 * from one to the next, as a meter's do.
 */
export function writeReadings(until: number, count: number, stepMs: number): string {
  const texts: string[] = [];
  for (let index = count - 1; index >= 0; index -= 1) {
    const at = until - index * stepMs;
    const jitter = (at / stepMs) % 7;
    texts.push(`{"t":${at},"rpm":${1697 + jitter},"in":0,"act":0,"w":${420 + jitter},"src":"program"}`);
  }
  return count === 1 ? (texts[0] ?? '') : `[${texts.join(',')}]`;
}
