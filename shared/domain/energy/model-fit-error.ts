/**
 * How well a fitted model of energy follows what was measured. Shares of the mean measured value. `nmbe` above 0: the
 * model reads low. Both are divided by n − p (points less fitted parameters).
 */
export type ModelFitError = {
  readonly cvRmse: number;
  readonly nmbe: number;
  readonly points: number;
  readonly parameters: number;
};

/** Largest CV(RMSE) and |NMBE| of a usable model. Source: ASHRAE G14-2014 as quoted on mepvault.com. */
export const MODEL_FIT_LIMITS = {
  monthly: { cvRmse: 0.15, nmbe: 0.05 },
  hourly: { cvRmse: 0.3, nmbe: 0.1 },
} as const;

/**
 * CV(RMSE) and NMBE of a model, both with the divisor n − p: √(Σ(y − ŷ)² ÷ (n − p)) ÷ ȳ and Σ(y − ŷ) ÷ ((n − p)·ȳ).
 * Always show both: a low NMBE alone hides errors that cancel. undefined for lists of unlike length, numbers that are
 * not finite, no points to spare, or a mean that is not above 0.
 *
 * @example modelFitError([100, 110, 90], [98, 112, 91], 1) // { cvRmse: 0.0212, nmbe: -0.005, points: 3, parameters: 1 }
 * Source: ASHRAE Guideline 14 (divisor from memory; texts differ in divisor and sign).
 */
export function modelFitError(
  measured: readonly number[],
  modelled: readonly number[],
  parameters: number,
): ModelFitError | undefined {
  const spare = measured.length - parameters;
  const mean = measured.reduce((sum, value) => sum + value, 0) / measured.length;
  const left = measured.map((value, index) => value - (modelled[index] ?? Number.NaN));
  if (measured.length !== modelled.length || !Number.isInteger(parameters) || parameters < 0) return undefined;
  if (spare <= 0 || !(mean > 0) || !Number.isFinite(mean) || !left.every(Number.isFinite)) return undefined;
  const squares = left.reduce((sum, value) => sum + value * value, 0);
  const bias = left.reduce((sum, value) => sum + value, 0);
  return {
    cvRmse: Math.sqrt(squares / spare) / mean,
    nmbe: bias / spare / mean,
    points: measured.length,
    parameters,
  };
}

/** Whether a model may stand for a baseline, by the limits for its interval; both figures must hold. */
export const isUsableFit = (error: ModelFitError, interval: keyof typeof MODEL_FIT_LIMITS): boolean =>
  error.cvRmse <= MODEL_FIT_LIMITS[interval].cvRmse && Math.abs(error.nmbe) <= MODEL_FIT_LIMITS[interval].nmbe;
