/** The supply at one pad: what it stands at, and how it swings with the street's load over a day. */
export type Supply = { readonly standingVolts: number; readonly swingVolts: number };

const DAY_MS = 86_400_000;

/** Line voltage, V, without noise. Lowest in the early evening, when the street cooks and cools. */
export function lineVolts(supply: Supply, share: number, wallMs: number): number {
  const evening = Math.cos(2 * Math.PI * (wallMs / DAY_MS - 18.5 / 24));
  return (supply.standingVolts - supply.swingVolts * evening) * share;
}
