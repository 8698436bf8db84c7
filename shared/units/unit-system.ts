/** US customary or SI. Values are kept in one unit (rpm, W, Wh, gpm, US gal, ft, psi, °C) and shown in either. */
export const UNIT_SYSTEMS = ['us', 'si'] as const;
export type UnitSystem = (typeof UNIT_SYSTEMS)[number];
