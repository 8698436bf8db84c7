/** A part of a day, up to a slot: what it cost and gave, and the part before it. */
export type Label = {
  readonly cost: number;
  readonly gallons: number;
  readonly count: number;
  readonly choice: number;
  readonly before: Label | undefined;
};

/**
 * Leaves out every label that another one matches or beats in cost, water and count alike. Counts are whole, from 0.
 *
 * @example keepBest([dear, cheap], 0) // [cheap], where cheap gives as much water
 */
export function keepBest(labels: Label[], wantedCount: number): Label[] {
  if (labels.length < 2) return labels;
  labels.sort((left, right) => left.cost - right.cost || right.gallons - left.gallons || right.count - left.count);
  // The most water of any cheaper label that counts at least this many.
  const most = new Float64Array(wantedCount + 1).fill(Number.NEGATIVE_INFINITY);
  return labels.filter((label) => {
    if ((most[label.count] ?? 0) >= label.gallons) return false;
    for (let count = label.count; count >= 0 && (most[count] ?? 0) < label.gallons; count -= 1)
      most[count] = label.gallons;
    return true;
  });
}
