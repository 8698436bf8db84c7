import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { modelWatts } from './primed-watts.ts';

/**
 * The most watts that any flow of the model takes, over those of its duty point: a load beyond that is no water.
 * undefined without a model and a commissioned system.
 *
 * @example mostWattsShare(context) // 1.14
 */
export function mostWattsShare(context: PumpContext): number | undefined {
  const { wetEnd, systemK } = context;
  if (wetEnd === undefined || systemK === undefined) return undefined;
  const duty = modelWatts(wetEnd.referenceRpm, context)?.watts ?? 0;
  const most = Math.max(...wetEnd.points.map(({ watts }) => watts));
  return duty > 0 ? most / duty : undefined;
}
