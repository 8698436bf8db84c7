import type { Outage } from './link-facts.ts';

/**
 * How much of a stretch (ms) lies in outages, ms.
 *
 * @example outageMs([{ from: 10, to: 40, booted: true }], 20, 100) // 20
 */
export function outageMs(outages: readonly Outage[], from: number, to: number): number {
  let sum = 0;
  for (const outage of outages) sum += Math.max(0, Math.min(outage.to, to) - Math.max(outage.from, from));
  return sum;
}

/**
 * The power cuts that ended in a stretch, together, ms. Where the device reports its boots, an outage without a new
 * boot was no power cut.
 *
 * @example cutMs({ outages, reportsBoots: true }, since, until)
 */
export function cutMs(
  { outages, reportsBoots }: { readonly outages: readonly Outage[]; readonly reportsBoots: boolean },
  from: number,
  to: number,
): number {
  let sum = 0;
  for (const outage of outages) {
    const counts = outage.booted || !reportsBoots;
    if (counts && outage.to > from && outage.to <= to) sum += outage.to - outage.from;
  }
  return sum;
}
