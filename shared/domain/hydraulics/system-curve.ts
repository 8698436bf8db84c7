/**
 * What the pipes ask of the pump: H = staticFeet + k·Q², feet over gpm. A pad has one for each position of its valves
 * (pool, spa, solar, in-floor heads); `name` is what a person called it.
 */
export type SystemCurve = { readonly name?: string | undefined; readonly staticFeet: number; readonly k: number };

/** US reference system curves, k in ft/gpm², no static head. All from memory; only C is in the DOE's test procedure. */
export const REFERENCE_SYSTEM_CURVES = {
  a: { name: 'A, 2-inch plumbing', staticFeet: 0, k: 0.0167 },
  b: { name: 'B, 1.5-inch plumbing', staticFeet: 0, k: 0.05 },
  c: { name: 'C, 2.5-inch plumbing', staticFeet: 0, k: 0.0082 },
} as const satisfies Record<string, SystemCurve>;

/**
 * Whether a system curve is one that water can have: finite, static head -100 to 300 ft, k above 0.
 *
 * @example isSystemCurve({ staticFeet: 0, k: -0.01 }) // false
 */
export const isSystemCurve = ({ staticFeet, k }: SystemCurve): boolean =>
  Number.isFinite(staticFeet) && staticFeet >= -100 && staticFeet <= 300 && Number.isFinite(k) && k > 0;

/**
 * The head (ft) that a system asks for at a flow (gpm from 0); undefined for bad input.
 *
 * @example systemHead({ staticFeet: 265, k: 7.75e-4 }, 200) // 296
 * Source: HI Data Tool, 01_sys-curves.
 */
export function systemHead(curve: SystemCurve, gpm: number): number | undefined {
  if (!isSystemCurve(curve) || !Number.isFinite(gpm) || gpm < 0) return undefined;
  return curve.staticFeet + curve.k * gpm * gpm;
}

/**
 * The k of the system (ft/gpm²) that asks for this head at this flow: (H − Hs) ÷ Q². undefined without flow, for bad
 * input, or where the head is not above the static head.
 *
 * @example systemK(60, 29.52) // 0.0082
 */
export function systemK(gpm: number, feet: number, staticFeet = 0): number | undefined {
  if (![gpm, feet, staticFeet].every(Number.isFinite) || gpm <= 0 || feet <= staticFeet) return undefined;
  const k = (feet - staticFeet) / (gpm * gpm);
  return Number.isFinite(k) ? k : undefined;
}
