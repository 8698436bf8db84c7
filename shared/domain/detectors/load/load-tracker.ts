import type { ControlAnswer } from '#shared/domain/control/control-answer.ts';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { STANDSTILL_RPM } from '#shared/domain/control/speed-tolerance.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { isRecord, type Json, restoreState, saveChanges } from '../plain-state.ts';
import { discardLearning, keepLearning, learnReading } from './learn-load.ts';
import { createLearnedBands } from './learned-bands.ts';
import type { LoadFacts } from './load-facts.ts';
import { restingLoad } from './load-state.ts';
import { createPrimeTeacher } from './prime-teacher.ts';
import { HALFWAY_SHARE, primedWattsAt, ROUGH_SHARE } from './primed-watts.ts';
import { forgetSmoothing, smoothWatts } from './smooth-watts.ts';
import { endTry, followLately, isDry, judgeLoad, startTry, type TryLimits, unloadedShare } from './track-prime.ts';

const SPEED_STEP_RPM = 20;

type Estimate = Pick<LoadFacts, 'basis' | 'usualRaggedness' | 'unloadedBelow'> & { readonly watts: number };

/** Follows one pump's load: starts, tries to prime, loaded or not, and what the watts of each speed usually are. */
export type LoadTracker = {
  readonly facts: LoadFacts;
  readonly read: (reading: Reading, control: ControlAnswer, elapsedMs: number, gap: boolean) => void;
  /** Forgets the stretch being learnt: an alarm says that it was not usual. */
  readonly discard: () => void;
  readonly learntVersion: () => number;
  readonly saveHot: () => Json;
  readonly saveLearnt: () => Json;
};

/**
 * A tracker that goes on from what was saved; what cannot be read back is learnt again.
 *
 * @example createLoadTracker(context, limits, undefined, undefined).facts.basis // 'none'
 */
export function createLoadTracker(context: PumpContext, limits: TryLimits, hot: unknown, learnt: unknown): LoadTracker {
  const state = restoreState(restingLoad(), hot);
  const saved = isRecord(learnt) ? learnt : {};
  const bands = createLearnedBands(saved.bands);
  const teacher = createPrimeTeacher(saved.prime);
  const facts = restingFacts((rpm) => primedWattsAt(rpm, bands, teacher.usual(), context).watts);
  let version = 0;
  const estimates = new Map<number, Estimate>();
  const bump = (): void => {
    version += 1;
    estimates.clear();
  };

  /** By steps of speed, so that it depends on nothing but the speed and what was learnt. */
  function estimateAt(measuredRpm: number): Estimate {
    const rpm = Math.round(measuredRpm / SPEED_STEP_RPM) * SPEED_STEP_RPM;
    const known = estimates.get(rpm);
    if (known !== undefined) return known;
    const { watts, basis } = primedWattsAt(rpm, bands, teacher.usual(), context);
    const band = basis === 'band' ? bands.find(rpm) : undefined;
    const usualRaggedness = band === undefined || band.median <= 0 ? 0 : (1.4826 * band.mad) / band.median;
    const unloadedBelow = basis === 'band' || basis === 'prime' ? HALFWAY_SHARE : ROUGH_SHARE;
    const estimate = { watts, basis, usualRaggedness, unloadedBelow };
    estimates.set(rpm, estimate);
    return estimate;
  }

  function run(reading: Reading, control: ControlAnswer, elapsedMs: number, gap: boolean): void {
    if (!state.running || gap) {
      startTry(state, reading.at, !state.running && !gap && state.stoppedAt !== 0);
      state.primeEndsAt = reading.at + (context.settings.prime?.seconds ?? 0) * 1000;
    }
    if (control.primeEndsAt !== undefined) state.primeEndsAt = control.primeEndsAt;
    smoothWatts(state, reading.at, reading.rpm, reading.watts, elapsedMs);
    const estimate = estimateAt(reading.rpm);
    facts.basis = estimate.basis;
    facts.primedWatts = estimate.watts;
    facts.unloadedBelow = unloadedShare(state, estimate.unloadedBelow);
    facts.usualRaggedness = estimate.usualRaggedness;
    facts.ratio = estimate.basis === 'none' ? Number.NaN : state.smoothWatts / estimate.watts;
    // While the shaft slows down its watts tell of the drive, not of the water: two readings at one speed are judged.
    const isSettled = control.rampOver && state.samples >= 2;
    const sure = estimate.basis === 'band' || estimate.basis === 'prime';
    const look = { at: reading.at, ratio: facts.ratio, unloadedBelow: facts.unloadedBelow, sure };
    if (isSettled && judgeLoad(state, look) && state.startSeen) bump();
    facts.dry = isDry(state, reading.watts, facts);
    if (isSettled) followLately(state, facts.ratio, elapsedMs);
    if (teacher.follow(reading, control, state)) bump();
    if (learnReading(state, bands, reading, control, elapsedMs, facts)) bump();
  }

  publish(facts, state);
  return {
    facts,
    read: (reading, control, elapsedMs, gap) => {
      if (gap) forgetSmoothing(state);
      if (reading.rpm > STANDSTILL_RPM) run(reading, control, elapsedMs, gap);
      else {
        if (state.running && keepLearning(state, bands)) bump();
        endTry(state, reading.at, context.settings.prime?.seconds ?? 0, limits);
        facts.ratio = Number.NaN;
        facts.dry = false;
      }
      publish(facts, state);
    },
    discard: () => discardLearning(state),
    learntVersion: () => version,
    saveHot: () => saveChanges(restingLoad(), state) ?? {},
    saveLearnt: () => ({ bands: bands.save(), prime: teacher.save() }),
  };
}

function publish(facts: LoadFacts, state: ReturnType<typeof restingLoad>): void {
  facts.running = state.running;
  facts.startedAt = state.startedAt;
  facts.startSeen = state.startSeen;
  facts.primeEndsAt = state.primeEndsAt;
  facts.watts = state.smoothWatts;
  facts.primedOnce = state.primedOnce;
  facts.primed = state.primed === 2 ? undefined : state.primed === 1;
  facts.primeSeconds = state.primeSeconds;
  facts.dryForSeconds = state.primedOnce ? Math.max(0, state.lastUnloadedAt - state.startedAt) / 1000 : 0;
  facts.failedTries = state.failedTries;
  facts.firstTryAt = state.firstTryAt;
  facts.raggedness = state.raggedness;
  facts.triedRpm = state.triedRpm;
  facts.triedWatts = state.triedWatts;
  facts.tryRaggedness = state.tryRaggedness;
  facts.stoodSeconds = state.stoodSeconds;
  facts.caught = state.caught;
}

function restingFacts(wattsAt: LoadFacts['wattsAt']): LoadFacts {
  return {
    running: false,
    startedAt: 0,
    startSeen: false,
    primeEndsAt: 0,
    watts: 0,
    primedWatts: 0,
    basis: 'none',
    ratio: Number.NaN,
    unloadedBelow: ROUGH_SHARE,
    primedOnce: false,
    primed: undefined,
    dry: false,
    primeSeconds: 0,
    dryForSeconds: 0,
    failedTries: 0,
    firstTryAt: 0,
    raggedness: 0,
    triedRpm: 0,
    triedWatts: 0,
    tryRaggedness: 0,
    usualRaggedness: 0,
    stoodSeconds: 0,
    caught: false,
    wattsAt,
  };
}
