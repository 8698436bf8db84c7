/** Vapour pressure of water, [°F, psia]. Source: HI engineering data book, liquid-water-US. */
export const WATER_VAPOUR_PSIA: readonly (readonly [number, number])[] = [
  [60, 0.2564],
  [70, 0.36336],
  [80, 0.50747],
  [90, 0.69904],
  [100, 0.95051],
];
