/** The one strip at its three sizes, in CSS pixels. `top` is the y of the highest speed, `base` that of standstill. */
export type StripSize = 'row' | 'day' | 'home';

export type StripMetrics = {
  readonly height: number;
  readonly top: number;
  readonly base: number;
  readonly pen: number;
  /** Whether words are written above the runs. */
  readonly labelled: boolean;
};

export const STRIP_METRICS: Readonly<Record<StripSize, StripMetrics>> = {
  row: { height: 64, top: 8, base: 58, pen: 1.8, labelled: false },
  day: { height: 200, top: 18, base: 192, pen: 2.2, labelled: true },
  home: { height: 132, top: 22, base: 124, pen: 2.2, labelled: true },
};

/** The wall compares pumps by height: one scale for all, unless a motor turns faster. */
export const USUAL_TOP_RPM = 3450;
