/** Why the readings cannot tell a flow. */
export type CannotTell =
  /** The watts hardly change with flow here, or less than the meter's error. */
  | 'flat-curve'
  /** Two flows give the same watts. */
  | 'turning-over'
  /** Too slow: the watts say almost nothing about flow; take k from a fast run of the day. */
  | 'low-speed'
  /** Less load than at shut-off: dead-headed, air, or another wet end. */
  | 'under-curve'
  /** More load than at the curve's end. */
  | 'over-curve'
  /** Static head above shut-off, or a system that asks less than the curve knows of. */
  | 'no-duty-point'
  | 'standing';

/**
 * A flow read from the watts, with one standard deviation. `from` says how: `watts` at this speed, or `system`, the k
 * of the day's fast runs scaled to this speed. `k` (ft/gpm²) is undefined at next to no flow.
 */
export type FlowEstimate = {
  readonly kind: 'estimate';
  readonly from: 'watts' | 'system';
  readonly gpm: number;
  readonly sigmaGpm: number;
  readonly feet: number;
  readonly sigmaFeet: number;
  readonly k: number | undefined;
  readonly sigmaK: number | undefined;
};

export type FlowAnswer =
  | FlowEstimate
  | { readonly kind: 'cannot-tell'; readonly because: CannotTell }
  | { readonly kind: 'refused'; readonly field: string; readonly allowed: string };

export const cannotTell = (because: CannotTell): FlowAnswer => ({ kind: 'cannot-tell', because });

export const refuseFlow = (field: string, allowed: string): FlowAnswer => ({ kind: 'refused', field, allowed });

/** One sigma wider than this share of the pump's flow range at that speed says nothing worth showing; common practice. */
export const WIDEST_SIGMA_SHARE = 0.2;
/** At and above this share of the reference speed the watts are trusted to tell flow; about 2400 of 3450 rpm. */
export const HIGH_SPEED_RATIO = 0.7;
