import type { EntryProblem, SlotChoices } from './entry-problem.ts';

/** The least cost of the water when every slot may mix speeds freely, and the price of the last gallon. */
export type Relaxation = { readonly cost: number; readonly costPerGallon: number };

type Corner = { readonly gallons: number; readonly cost: number };
/** A stretch of one slot's lower hull: so much more water at this cost a gallon. */
type Increment = { readonly gallons: number; readonly costPerGallon: number };

const slopeBetween = (from: Corner, to: Corner): number => (to.cost - from.cost) / (to.gallons - from.gallons);

/** The lower convex hull of a slot's choices, by water: mixing two choices reaches every point between them. */
function lowerHull(slot: SlotChoices): Corner[] {
  const corners = slot.cost
    .map((cost, choice) => ({ cost, gallons: slot.gallons[choice] ?? 0 }))
    .filter(({ cost }) => Number.isFinite(cost))
    .sort((left, right) => left.gallons - right.gallons || left.cost - right.cost);
  const hull: Corner[] = [];
  for (const corner of corners) {
    if (hull.at(-1)?.gallons === corner.gallons) continue;
    while (hull.length >= 2) {
      const [before, last] = [hull[hull.length - 2], hull[hull.length - 1]];
      if (before === undefined || last === undefined || slopeBetween(before, last) < slopeBetween(last, corner)) break;
      hull.pop();
    }
    hull.push(corner);
  }
  return hull;
}

/**
 * The convex relaxation of a day: slots may mix speeds, entries and primes are free, hours asked for are left out. Its
 * optimum is known: every slot starts at its least water, then the cheapest gallon anywhere is bought first, since each
 * slot's gallons only get dearer. No program costs less. undefined where a slot allows nothing, or the water is out of reach.
 *
 * @example relaxVolume(problem)?.cost // 1_830_000
 * Source: greedy optimum of a separable convex allocation (water-filling).
 */
export function relaxVolume(problem: EntryProblem): Relaxation | undefined {
  const hulls = problem.slots.map(lowerHull);
  let [cost, gallons] = [0, 0];
  const increments: Increment[] = [];
  for (const hull of hulls) {
    const [first] = hull;
    if (first === undefined) return undefined;
    cost += first.cost;
    gallons += first.gallons;
    hull.slice(1).forEach((corner, index) => {
      const from = hull[index] ?? first;
      increments.push({ gallons: corner.gallons - from.gallons, costPerGallon: slopeBetween(from, corner) });
    });
  }
  increments.sort((left, right) => left.costPerGallon - right.costPerGallon);
  let costPerGallon = 0;
  for (const increment of increments) {
    const missing = problem.wantedGallons - gallons;
    // Where energy has a price under nothing, water beyond the need is taken too.
    if (missing <= 0 && increment.costPerGallon >= 0) break;
    const taken = increment.costPerGallon < 0 ? increment.gallons : Math.min(increment.gallons, missing);
    gallons += taken;
    cost += taken * increment.costPerGallon;
    costPerGallon = Math.max(0, increment.costPerGallon);
  }
  // A sum of as many terms is short by its rounding, not by water.
  const tolerance = 1e-9 * Math.max(1, problem.wantedGallons);
  return gallons >= problem.wantedGallons - tolerance ? { cost, costPerGallon } : undefined;
}
