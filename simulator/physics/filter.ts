/** Dirt in filter and basket as factors on friction: 1 = clean. It grows with the water that has passed. */
export type Dirt = { filter: number; basket: number; gallons: number; since: number };

/** How fast one pad gets dirty: growth of the factors per thousand gallons. */
export type DirtRates = { readonly filterPerKilogallon: number; readonly basketPerKilogallon: number };

export function createDirt(at: number): Dirt {
  return { filter: 1, basket: 1, gallons: 0, since: at };
}

/** Counts the water since the last count. */
export function passWater(dirt: Dirt, rates: DirtRates, gpm: number, at: number): void {
  const gallons = (gpm * (at - dirt.since)) / 60_000;
  dirt.gallons += gallons;
  dirt.filter += (rates.filterPerKilogallon * gallons) / 1000;
  dirt.basket += (rates.basketPerKilogallon * gallons) / 1000;
  dirt.since = at;
}
