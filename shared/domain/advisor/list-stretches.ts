/** A stretch of slots, half-open, under one choice. */
export type Stretch = { from: number; to: number; choice: number };

/**
 * The stretches that a day's choices fall into, in order.
 *
 * @example listStretches([0, 0, 3]) // [{ from: 0, to: 2, choice: 0 }, { from: 2, to: 3, choice: 3 }]
 */
export function listStretches(choices: readonly number[]): Stretch[] {
  const stretches: Stretch[] = [];
  choices.forEach((choice, slot) => {
    const last = stretches.at(-1);
    if (last !== undefined && last.choice === choice) last.to = slot + 1;
    else stretches.push({ from: slot, to: slot + 1, choice });
  });
  return stretches;
}
