import { HIGH_SPEED_RATIO } from '#shared/domain/hydraulics/flow-estimate.ts';
import type { SystemEstimate } from '#shared/domain/hydraulics/system-estimate.ts';
import { DAY_MS } from '#shared/domain/time/local-time.ts';
import type { LevelSummary } from './level-summary.ts';
import type { FlowRate, KnownLevel, WaterMeter } from './water-meter.ts';
import type { WaterState } from './water-state.ts';
import type { WattsLevel } from './watts-level.ts';

/** Ten minutes at one level. */
export type Measured = {
  readonly level: WattsLevel;
  readonly summary: LevelSummary;
  readonly watts: number;
  readonly now: number;
};

/**
 * The system of one pump: as commissioned (`clean`) and as it is (`now`), as flow for each rpm. Ten minutes at a level
 * tell how it has changed since it was clean, by the change of the watts. Undefined where nobody can tell.
 */
export type SystemFollower = {
  readonly clean: () => FlowRate | undefined;
  readonly now: () => FlowRate | undefined;
  /** Works the clean system out again: levels have learnt a day. */
  readonly learn: (levels: readonly KnownLevel[]) => void;
  readonly measure: (measured: Measured) => void;
  /** How far the flow at a speed has fallen since it was clean, as a share; NaN where the watts cannot tell. */
  readonly dropAt: (rpm: number, cleanWatts: number, watts: number) => number;
};

/** One measurement moves the system's k by this much of the difference. */
const GAIN = 0.35;
/** A smaller change of k is not worth working the flow out again. */
const WORTHWHILE_SHARE = 0.01;
/** A shut valve asks for any head; further than this k tells nothing more. */
const MOST_TIMES_CLEAN = 100;
/** Watts this far over the clean ones are no water: something rubs, or nobody can tell. */
const RUBBING_RATIO = 1.08;
/** More watts than with a clean filter are believed to be water only so far. */
const MOST_OVER_CLEAN = 0.02;
/** A change of flow seen in the watts is good to this share of the flow, one sigma. */
const CHANGE_SIGMA_SHARE = 0.04;

/** Follows a pump's system through its meter; the k it has come to lies in `state`. */
export function createSystemFollower(meter: WaterMeter, state: WaterState): SystemFollower {
  let system: SystemEstimate | undefined;
  let clean: FlowRate | undefined;
  let now: FlowRate | undefined;
  let rateK = 0;

  function tellNow(): void {
    if (system === undefined || state.k <= 0) now = clean;
    else if (Math.abs(state.k / rateK - 1) > WORTHWHILE_SHARE || rateK === 0) {
      rateK = state.k;
      const rate = meter.rateOn({ ...system, k: state.k, sigmaK: (system.sigmaK / system.k) * state.k });
      now = rate && { ...rate, sigmaShare: Math.hypot(rate.sigmaShare, CHANGE_SIGMA_SHARE) };
    }
  }

  function gpmAfter(rpm: number, changeWatts: number): number | undefined {
    return clean === undefined ? undefined : meter.gpmAfter(rpm, clean.gpmPerRpm * rpm, changeWatts);
  }

  return {
    clean: () => clean,
    now: () => now,
    learn: (levels) => {
      system = meter.clean(levels);
      clean = system && meter.rateOn(system);
      rateK = 0;
      tellNow();
    },
    measure: ({ level, summary, watts, now: at }) => {
      const speedRatio = level.rpm / meter.referenceRpm;
      // Fast runs tell; a slow one only where there was none within a day.
      const speaks = speedRatio >= HIGH_SPEED_RATIO || speedRatio >= state.kRatio - 0.02 || at - state.kAt > DAY_MS;
      const { cleanWatts } = summary;
      if (!speaks || cleanWatts === 0 || level.valves !== 0 || watts > RUBBING_RATIO * cleanWatts) return;
      const gpm = gpmAfter(level.rpm, Math.min(watts - cleanWatts, MOST_OVER_CLEAN * cleanWatts));
      const k = gpm === undefined ? undefined : meter.kAt(level.rpm, gpm);
      if (k === undefined || system === undefined) return;
      const bounded = Math.min(k, MOST_TIMES_CLEAN * system.k);
      state.k = state.k > 0 ? state.k + GAIN * (bounded - state.k) : bounded;
      state.kAt = at;
      state.kRatio = speedRatio;
      tellNow();
    },
    dropAt: (rpm, cleanWatts, watts) => {
      if (!(cleanWatts > 0 && watts > 0) || clean === undefined) return Number.NaN;
      const after = gpmAfter(rpm, Math.min(0, watts - cleanWatts));
      return after === undefined ? Number.NaN : 1 - after / (clean.gpmPerRpm * rpm);
    },
  };
}
