/** What the water has to pass: static head and the friction of pipes, filter and valves. */
export type SystemCurve = {
  readonly staticFeet: number;
  /** Friction of pipes and fittings, ft at 1 gpm to the power below. */
  readonly pipe: number;
  /** The same for a clean filter. */
  readonly filter: number;
};

/** Turbulent flow in smooth pipe lies between Hazen-Williams' 1.852 and the fully rough 2. */
export const FRICTION_EXPONENT = 1.9;

/** What changes the curve: valves, baskets, the dirt in the filter. All are factors on friction, 1 = as commissioned. */
export type SystemState = {
  readonly valve: number;
  readonly dirt: number;
  readonly staticFeet: number;
};

/** Head, ft, that the system takes at a flow. */
export function systemFeet(curve: SystemCurve, state: SystemState, gpm: number): number {
  const friction = (curve.pipe + curve.filter * state.dirt) * state.valve;
  return curve.staticFeet + state.staticFeet + friction * gpm ** FRICTION_EXPONENT;
}
