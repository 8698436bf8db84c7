/** The wall's columns, for its head and its rows alike: mark, name, strip, speed, watts. On a phone the strip goes below. */
export const FLEET_COLUMNS =
  'grid grid-cols-[40px_minmax(0,1fr)_auto] md:grid-cols-[40px_minmax(170px,22%)_minmax(0,1fr)_96px_78px]';

/** Row heights in CSS pixels; the list is virtual and must know them. */
export const ROW_HEIGHT = { wide: 64, narrow: 124 } as const;

export const WIDE = '(min-width: 48rem)';
