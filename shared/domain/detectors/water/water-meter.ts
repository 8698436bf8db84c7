import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { estimateFlow } from '#shared/domain/hydraulics/estimate-flow.ts';
import { fitWetEnd } from '#shared/domain/hydraulics/fit-wet-end.ts';
import { createFlowAfterChange, type FlowAfterChange } from '#shared/domain/hydraulics/flow-after-change.ts';
import { HIGH_SPEED_RATIO } from '#shared/domain/hydraulics/flow-estimate.ts';
import { METER_AS_FITTED } from '#shared/domain/hydraulics/meter-error.ts';
import { scaleFlow } from '#shared/domain/hydraulics/scale-flow.ts';
import { systemK } from '#shared/domain/hydraulics/system-curve.ts';
import { estimateDaySystem, type SystemEstimate } from '#shared/domain/hydraulics/system-estimate.ts';
import { headAt, type WetEndCurve } from '#shared/domain/hydraulics/wet-end-curve.ts';
import type { LevelSummary } from './level-summary.ts';

/** Flow for each rpm, gpm: without static head flow goes with speed. `sigmaShare` is one sigma as a share of it. */
export type FlowRate = { readonly gpmPerRpm: number; readonly sigmaShare: number };

/** One speed's level, as the meter needs it. */
export type KnownLevel = { readonly rpm: number; readonly summary: LevelSummary };

/** The virtual flow meter of one pump, read every ten minutes at a settled speed. */
export type WaterMeter = {
  /** The system as commissioned, or as the watts of fast runs tell; undefined where neither does. */
  readonly clean: (levels: readonly KnownLevel[]) => SystemEstimate | undefined;
  /** Flow on a system; undefined where pump and system do not meet, or nobody can say within a fifth. */
  readonly rateOn: (system: SystemEstimate) => FlowRate | undefined;
  readonly gpmAfter: FlowAfterChange;
  /** k of the system that gives this flow at this speed. */
  readonly kAt: (rpm: number, gpm: number) => number | undefined;
  readonly referenceRpm: number;
};

/** A k found with gauges at start-up; common practice: a gauge reads to some per cent, and pipes are changed. */
const COMMISSIONED_K_SHARE = 0.12;
const WIDEST_SHARE = 0.25;

/**
 * The meter of a pump; undefined without a wet-end model that can be fitted.
 *
 * @example createWaterMeter(context)?.rateOn({ staticFeet: 0, k: 0.0095, sigmaK: 0.001 }) // { gpmPerRpm: 0.018, … }
 */
export function createWaterMeter({ wetEnd, systemK: commissioned }: PumpContext): WaterMeter | undefined {
  const fitted = wetEnd === undefined ? undefined : fitWetEnd(wetEnd);
  if (fitted?.ok !== true) return undefined;
  const curve = fitted.value;
  const { referenceRpm } = curve;
  const known = commissioned !== undefined && commissioned > 0 && Number.isFinite(commissioned);
  return {
    referenceRpm,
    clean: (levels) =>
      known
        ? { staticFeet: 0, k: commissioned, sigmaK: COMMISSIONED_K_SHARE * commissioned }
        : systemOfFastRuns(curve, levels),
    rateOn: (system) => {
      const flow = scaleFlow(curve, referenceRpm, system);
      if (flow.kind !== 'estimate' || !(flow.sigmaGpm <= WIDEST_SHARE * flow.gpm)) return undefined;
      return { gpmPerRpm: flow.gpm / referenceRpm, sigmaShare: flow.sigmaGpm / flow.gpm };
    },
    gpmAfter: createFlowAfterChange(curve),
    kAt: (rpm, gpm) => {
      const feet = headAt(curve, rpm, gpm);
      return feet === undefined ? undefined : systemK(gpm, feet);
    },
  };
}

/** Without a k from start-up: what the usual watts of the fast speeds say of themselves. */
function systemOfFastRuns(curve: WetEndCurve, levels: readonly KnownLevel[]): SystemEstimate | undefined {
  const flows = levels.flatMap(({ rpm, summary }) => {
    const speedRatio = rpm / curve.referenceRpm;
    const watts = summary.cleanWatts || summary.usualWatts;
    if (speedRatio < HIGH_SPEED_RATIO || watts === 0) return [];
    return [{ speedRatio, milliseconds: 1, flow: estimateFlow(curve, { rpm, watts }, METER_AS_FITTED) }];
  });
  return estimateDaySystem(flows, 0);
}
