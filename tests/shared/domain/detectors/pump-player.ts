import { DEFAULT_TRAITS, type MotorSettings } from '#shared/domain/control/motor-settings.ts';
import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import type { AlarmSignal, Detector } from '#shared/domain/detectors/detector.ts';
import type { DetectorParameters } from '#shared/domain/detectors/detector-parameters.ts';
import { createPumpFold, type PumpFold } from '#shared/domain/fold/fold-pump.ts';
import type { PumpEvent } from '#shared/domain/fold/pump-event.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';

export const SECOND = 1000;
export const MINUTE = 60_000;
export const HOUR = 3_600_000;
export const DAY = 86_400_000;
/** Midnight in Phoenix, which knows no daylight saving, on Monday 2 June 2025. */
export const MONDAY = Date.UTC(2025, 5, 2, 7);

export const EVERY_DAY = [true, true, true, true, true, true, true];

export const SETTINGS: MotorSettings = {
  inputs: [2850, 2400, null],
  program: [{ days: EVERY_DAY, fromMinute: 360, toMinute: 1200, rpm: 1700 }],
  prime: { rpm: 3450, seconds: 180 },
  timed: { rpm: 3200, minutes: 45 },
  freeze: { celsius: 4.4, rpm: 1150 },
  maxRpm: 3450,
  minRpm: 600,
};

export const CONTEXT: PumpContext = {
  pumpId: 'pump-1',
  zone: 'America/Phoenix',
  area: 'North',
  padState: 'open',
  intervalSeconds: 10,
  settings: SETTINGS,
  traits: DEFAULT_TRAITS,
  inputs: [
    {
      number: 1,
      kind: 'clock',
      windows: [{ days: EVERY_DAY, onMinute: 600, offMinute: 840, opensEarlyMinutes: 20 }],
      drives: 'filter',
    },
    {
      number: 2,
      kind: 'clock',
      windows: [{ days: EVERY_DAY, onMinute: 960, offMinute: 1080, opensEarlyMinutes: 0 }],
    },
  ],
  equipment: [],
  wetEnd: {
    referenceRpm: 3450,
    standbyWatts: 8,
    points: [
      { gpm: 0, feet: 84, watts: 980 },
      { gpm: 40, feet: 79, watts: 1420 },
      { gpm: 80, feet: 62, watts: 1820 },
      { gpm: 110, feet: 38, watts: 1900 },
    ],
  },
  systemK: 0.0095,
  nominalVolts: 230,
};

/** What a pad does between two instants; left out = what a good motor would do by itself. */
export type Scene = Partial<Omit<Reading, 'at'>> & {
  /** Watts over what a primed wet end draws; 1 unless stated. */
  readonly load?: number;
  /** Minutes by which the motor's own clock is ahead. */
  readonly clockAhead?: number;
};

/** Watts of the player's own pump: a plain cubic with some loss, nothing of the fold's model. */
export const primedWatts = (rpm: number): number => (rpm <= 40 ? 6 : 12 + 0.03 * rpm + 1560 * (rpm / 3450) ** 3);

/**
 * Plays a pump that does what it should, except for what a scene says, through the real fold. Cadence 10 s unless the
 * context says otherwise; readings come also at once when inputs change.
 */
export function createPlayer(context: PumpContext = CONTEXT, start = MONDAY, seed = 1) {
  const signals: AlarmSignal[] = [];
  let fold: PumpFold = createPumpFold(context);
  let at = start;
  let rpm = 0;
  let startedAt: number | undefined;
  const random = createRandom(seed);

  const push = (event: PumpEvent): void => {
    fold.push(event);
    signals.push(...fold.take().signals);
  };

  function ownSpeed(scene: Scene): { rpm: number; source: Reading['reportedSource']; active: number } {
    const closed = scene.closedInputs ?? 0;
    const speeds = context.settings.inputs.map((speed, index) => ((closed & (1 << index)) !== 0 ? (speed ?? 0) : 0));
    const highest = Math.max(0, ...speeds);
    if (highest > 0) return { rpm: highest, source: 'input', active: speeds.indexOf(highest) + 1 };
    const minute = (((at - start) / MINUTE + (scene.clockAhead ?? 0)) % 1440) + 0;
    const entry = context.settings.program.find((one) => minute >= one.fromMinute && minute < one.toMinute);
    return entry === undefined
      ? { rpm: 0, source: 'off', active: 0 }
      : { rpm: entry.rpm, source: 'program', active: 0 };
  }

  function reading(scene: Scene): Reading {
    const own = ownSpeed(scene);
    let wanted = scene.rpm ?? own.rpm;
    let source = own.source;
    if (wanted <= 40) startedAt = undefined;
    else startedAt ??= at;
    const { prime } = context.settings;
    if (
      scene.rpm === undefined &&
      startedAt !== undefined &&
      prime !== null &&
      at - startedAt < prime.seconds * SECOND
    ) {
      wanted = prime.rpm;
      source = 'prime';
    }
    rpm = wanted;
    const measured = rpm <= 40 ? rpm : rpm + (random() - 0.5) * 10;
    const load = scene.load ?? 1;
    const { load: _, clockAhead: __, ...said } = scene;
    return {
      at,
      closedInputs: 0,
      activeInput: own.active,
      reportedSource: source,
      ...said,
      rpm: measured,
      watts: scene.watts ?? primedWatts(rpm) * load * (1 + (random() - 0.5) * 0.04),
    };
  }

  const player = {
    signals,
    get at() {
      return at;
    },
    get fold() {
      return fold;
    },
    push,
    /** Plays a scene for so long, ms. */
    play(
      duration: number,
      scene: Scene | ((at: number) => Scene) = {},
      every = context.intervalSeconds * SECOND,
    ): void {
      const end = at + duration;
      for (; at < end; at += every) {
        const now = typeof scene === 'function' ? scene(at) : scene;
        push({ kind: 'reading', reading: reading(now), receivedAt: at + 400, single: true });
      }
    },
    /** Plays a scene until so many minutes after local midnight of the day counted from the start. */
    playUntil(day: number, minute: number, scene: Scene | ((at: number) => Scene) = {}, every?: number): void {
      player.play(start + day * DAY + minute * MINUTE - at, scene, every);
    },
    /** Lets time pass without a reading; the server goes on listening. */
    silence(duration: number, tick = MINUTE): void {
      const end = at + duration;
      for (let now = at + tick; now <= end; now += tick) push({ kind: 'time', receivedAt: now });
      at = end;
    },
    /** Brings the fold through storage, as a restart of the server does. */
    restart(nextContext: PumpContext = context, parameters?: DetectorParameters): void {
      const saved = JSON.parse(JSON.stringify(fold.save())) as { hot: unknown; learnt: unknown };
      fold = createPumpFold(nextContext, saved, parameters);
    },
    raised: (detector: Detector) =>
      signals.filter((signal) => signal.type === 'raised').filter((signal) => signal.detector === detector),
    cleared: (detector: Detector) =>
      signals.filter((signal) => signal.type === 'cleared').filter((signal) => signal.detector === detector),
    /** Class, priority and cause as they stand now; undefined where the alarm does not stand. */
    standing(detector: Detector) {
      const last = signals.filter((signal) => signal.detector === detector).at(-1);
      return last === undefined || last.type === 'cleared' ? undefined : last;
    },
    /** Detectors that raised, each once. */
    spoken: (): Detector[] => [
      ...new Set(signals.filter((signal) => signal.type === 'raised').map((signal) => signal.detector)),
    ],
  };
  return player;
}

/** For tests that last days: a reading a minute is enough for clocks. */
export const COARSE: PumpContext = { ...CONTEXT, intervalSeconds: 60 };

export type Player = ReturnType<typeof createPlayer>;

/** The clocks of the context as they should switch: closed inputs at an instant. */
export function clocks(context: PumpContext = CONTEXT, start = MONDAY): (at: number) => number {
  return (at) => {
    const minute = ((((at - start) / MINUTE) % 1440) + 1440) % 1440;
    let mask = 0;
    for (const input of context.inputs) {
      for (const window of input.windows) {
        const off = window.offMinute - window.opensEarlyMinutes;
        if (minute >= window.onMinute && minute < off) mask |= 1 << (input.number - 1);
      }
    }
    return mask;
  };
}

/** A good day of the context: clocks, program, prime. */
export const goodDay = (context: PumpContext = CONTEXT, start = MONDAY) => {
  const closed = clocks(context, start);
  return (at: number): Scene => ({ closedInputs: closed(at) });
};

/** Mulberry32: small, seeded, good enough for noise. */
export function createRandom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let value = Math.imul(state ^ (state >>> 15), 1 | state);
    value = (value + Math.imul(value ^ (value >>> 7), 61 | value)) ^ value;
    return ((value ^ (value >>> 14)) >>> 0) / 4_294_967_296;
  };
}
