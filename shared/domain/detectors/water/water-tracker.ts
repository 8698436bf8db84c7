import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { CAUSE_CHAIN, CONSEQUENCES } from '../cause-chain.data.ts';
import type { Detector } from '../detector.ts';
import type { Facts } from '../facts.ts';
import { type Json, restoreState, saveChanges } from '../plain-state.ts';
import { type LevelSummary, summarizeLevel } from './level-summary.ts';
import { createSystemFollower } from './system-follower.ts';
import { restingWater, type WaterFacts } from './water-facts.ts';
import { createWaterMeter } from './water-meter.ts';
import { restingWaterState, type WaterState } from './water-state.ts';
import {
  addSample,
  findLevel,
  forgetToday,
  LEVEL_SHARE,
  makeLevel,
  restoreLevels,
  saveLevelDays,
  saveLevelToday,
  type WattsLevel,
} from './watts-level.ts';

/** Follows what each speed draws over the days, and from that the water that moves. */
export type WaterTracker = {
  readonly facts: WaterFacts;
  /** Takes in a reading that control and load have seen. */
  readonly read: (facts: Facts) => void;
  /** Tells the flow at the last reading again, for one that goes on from what was saved. */
  readonly resume: (facts: Facts) => void;
  readonly learntVersion: () => number;
  readonly saveHot: () => Json;
  readonly saveLearnt: () => Json;
};

/** Nothing is measured in the first minutes after a start, nor in the first minute at a speed. */
const AFTER_START_MS = 300_000;
const AFTER_CHANGE_SECONDS = 60;
const SAMPLE_MS = 600_000;
/** While one of these stands, what the pump draws is not usual. */
const LOAD_ALARMS: readonly Detector[] = CAUSE_CHAIN.filter(
  (one) => one === 'low-load' || one === 'high-load' || CONSEQUENCES[one]?.includes('low-load'),
);
/** What these drive turns valves: the same speed on other pipes. */
const VALVE_DUTIES: readonly unknown[] = ['solar', 'spa', 'feature'];

/**
 * A tracker that goes on from what was saved; what cannot be read back, or was learnt of another system, is learnt again.
 *
 * @example createWaterTracker(context, undefined, undefined).facts.gpm // NaN before any reading
 */
export function createWaterTracker(context: PumpContext, hot: unknown, learnt: unknown): WaterTracker {
  const saved = typeof hot === 'object' && hot !== null ? (hot as Readonly<Record<string, unknown>>) : {};
  const restored = restoreState(restingWaterState(), saved.state);
  const commissionedK = context.systemK ?? 0;
  const same = restored.commissionedK === commissionedK;
  const state: WaterState = same ? restored : { ...restingWaterState(), commissionedK };
  const levels = same ? restoreLevels(saved.today, learnt) : [];
  const summaries = new Map<WattsLevel, LevelSummary>(levels.map((one) => [one, summarizeLevel(one)]));
  const meter = createWaterMeter(context);
  const system = meter && createSystemFollower(meter, state);
  const valveMask = maskOfValves(context);
  const water = restingWater();
  let level: WattsLevel | undefined;
  let version = 0;

  const learn = (): void =>
    system?.learn([...summaries].flatMap(([{ rpm, valves }, summary]) => (valves === 0 ? [{ rpm, summary }] : [])));
  learn();

  function show(): void {
    const summary = level === undefined ? undefined : summaries.get(level);
    water.usualWatts = summary?.usualWatts ?? 0;
    water.usualSpread = summary?.usualSpread ?? 0;
    water.cleanWatts = summary?.cleanWatts ?? 0;
    const yesterday = summary?.yesterdayWatts ?? 0;
    water.ratioYesterday = water.usualWatts > 0 && yesterday > 0 ? yesterday / water.usualWatts : Number.NaN;
    water.dropOfDays = Number.NaN;
    water.dropNow = Number.NaN;
    water.wattsDropOfDays = Number.NaN;
    water.wattsDropNow = Number.NaN;
  }

  function moveTo(rpm: number, valves: number): void {
    if (level !== undefined && level.valves === valves && Math.abs(level.rpm - rpm) <= LEVEL_SHARE * level.rpm) return;
    level = findLevel(levels, rpm, valves);
    show();
  }

  function takeSample(facts: Facts, valves: number): void {
    const [watts, rpm] = [state.wattMs / state.ms, state.rpmMs / state.ms];
    endStretch(state);
    if (!(watts > 0)) return;
    const alarmed = LOAD_ALARMS.some(facts.stands);
    level = makeLevel(levels, rpm, valves, facts.localDay);
    if (level.alarmed && !alarmed) forgetToday(level);
    const closedDay = addSample(level, watts, facts.localDay, facts.load.startedAt, alarmed);
    for (const known of summaries.keys()) if (!levels.includes(known)) summaries.delete(known);
    const summary = summarizeLevel(level, closedDay ? undefined : summaries.get(level));
    summaries.set(level, summary);
    if (closedDay) {
      version += 1;
      learn();
    }
    show();
    tellDrops(watts, summary);
    system?.measure({ level, summary, watts, now: facts.now });
  }

  function tellDrops(watts: number, { cleanWatts, watts3Days, atOnce, sinceDay }: LevelSummary): void {
    if (level === undefined) return;
    water.wattsDropOfDays = watts3Days > 0 ? 1 - watts3Days / cleanWatts : Number.NaN;
    water.wattsDropNow = cleanWatts > 0 ? 1 - watts / cleanWatts : Number.NaN;
    water.dropOfDays = system?.dropAt(level.rpm, cleanWatts, watts3Days) ?? Number.NaN;
    water.dropNow = system?.dropAt(level.rpm, cleanWatts, watts) ?? Number.NaN;
    water.dropAtOnce = atOnce;
    water.dropSinceDay = sinceDay;
  }

  function flow({ control, load }: Facts): void {
    if (system === undefined) return;
    const { rpm, standing } = control;
    const now = system.now();
    const clean = system.clean();
    water.sigmaShare = now === undefined ? 0 : now.sigmaShare;
    water.gpm = standing || load.primed === false ? 0 : now === undefined ? Number.NaN : now.gpmPerRpm * rpm;
    water.cleanGpm = standing ? 0 : clean === undefined ? Number.NaN : clean.gpmPerRpm * rpm;
  }

  return {
    facts: water,
    read: (facts) => {
      flow(facts);
      if (!isSettled(facts)) {
        water.ratio = Number.NaN;
        if (state.ms !== 0) endStretch(state);
        return;
      }
      const { reading, control, load, elapsedMs } = facts;
      const valves = reading.closedInputs & valveMask;
      moveTo(control.rpm, valves);
      state.wattMs += reading.watts * elapsedMs;
      state.rpmMs += control.rpm * elapsedMs;
      state.ms += elapsedMs;
      if (state.ms >= SAMPLE_MS) takeSample(facts, valves);
      water.ratio = water.usualWatts > 0 ? load.watts / water.usualWatts : Number.NaN;
    },
    resume: flow,
    learntVersion: () => version,
    saveHot: () => ({ state: saveChanges(restingWaterState(), state) ?? {}, today: saveLevelToday(levels) }),
    saveLearnt: () => saveLevelDays(levels),
  };
}

function endStretch(state: WaterState): void {
  state.wattMs = 0;
  state.rpmMs = 0;
  state.ms = 0;
}

function isSettled({ control, load, now, gap }: Facts): boolean {
  if (control.standing || gap || !control.rampOver || control.offExpected) return false;
  if (control.sinceChangeSeconds < AFTER_CHANGE_SECONDS || now - load.startedAt < AFTER_START_MS) return false;
  const { source } = control.decision;
  // On manual somebody may have hung a hose on the suction, or turned a valve.
  return source === 'program' || source === 'input' || source === 'freeze';
}

function maskOfValves({ inputs, equipment }: PumpContext): number {
  const turning = inputs.filter(({ drives, kind }) => VALVE_DUTIES.includes(drives) || kind === 'solar-controller');
  const fed = equipment
    .filter(({ kind }) => kind === 'solar' || kind === 'feature')
    .flatMap(({ input }) => input ?? []);
  return [...turning.map(({ number }) => number), ...fed].reduce((mask, number) => mask | (1 << (number - 1)), 0);
}
