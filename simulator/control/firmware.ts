import type { Source } from '#shared/contract/mqtt/readings.ts';
import type { MotorSettings } from '#shared/contract/mqtt/settings.ts';
import type { MotorModel } from './motor-model.ts';

/** What the firmware keeps from one moment to the next. All times are real ms. */
export type Firmware = {
  running: boolean;
  primeEndsAt: number | undefined;
  tries: number;
  /** Between two tries to prime, or resting after the last one. */
  pausedUntil: number | undefined;
  resting: boolean;
  keypadRpm: number | undefined;
  timedEndsAt: number | undefined;
  stopped: boolean;
  freezeUntil: number | undefined;
  fault: { readonly code: string | undefined } | undefined;
};

/** What it senses. `closed` is the mask at its own terminals, `programOn` the entries current by its own clock. */
export type Sensed = {
  readonly at: number;
  readonly closed: number;
  readonly programOn: readonly number[];
  readonly ambientCelsius: number;
  readonly loaded: boolean;
};

export type Command = { readonly source: Source; readonly rpm: number; readonly activeInput: number };

type Wish = Command;

const HOUR_MS = 3_600_000;
const OFF: Command = { source: 'off', rpm: 0, activeInput: 0 };
const STOPPED: Command = { source: 'stop', rpm: 0, activeInput: 0 };
const FAULTED: Command = { source: 'fault', rpm: 0, activeInput: 0 };

export function createFirmware(): Firmware {
  return {
    running: false,
    primeEndsAt: undefined,
    tries: 0,
    pausedUntil: undefined,
    resting: false,
    keypadRpm: undefined,
    timedEndsAt: undefined,
    stopped: false,
    freezeUntil: undefined,
    fault: undefined,
  };
}

/** Decides what the motor does now. Moves the state: primes begin and end, timed runs run out. */
export function runFirmware(firmware: Firmware, settings: MotorSettings, model: MotorModel, sensed: Sensed): Command {
  const wish = findWish(firmware, settings, model, sensed);
  if (wish.rpm === 0) {
    standStill(firmware);
    return wish;
  }
  return prime(firmware, settings, model, sensed, wish);
}

function findWish(firmware: Firmware, settings: MotorSettings, model: MotorModel, sensed: Sensed): Wish {
  if (firmware.fault !== undefined) return FAULTED;
  const input = winningInput(settings, sensed.closed);
  if (firmware.stopped && (input === undefined || model.stopBeatsInputs)) return STOPPED;
  // An input that takes over ends a timed run, unless the model goes on with it afterwards.
  if (input !== undefined && !model.timedResumes) firmware.timedEndsAt = undefined;
  return (
    input ??
    keypad(firmware) ??
    timed(firmware, settings, sensed.at) ??
    program(settings, model, sensed.programOn) ??
    freeze(firmware, settings, sensed) ??
    OFF
  );
}

/** Of the closed inputs that are set, the fastest; at equal speeds the first. */
function winningInput(settings: MotorSettings, closed: number): Wish | undefined {
  let best: Wish | undefined;
  settings.inputs.forEach((rpm, index) => {
    if (rpm === null || (closed & (1 << index)) === 0) return;
    if (best === undefined || rpm > best.rpm) best = { source: 'input', rpm, activeInput: index + 1 };
  });
  return best;
}

function keypad(firmware: Firmware): Wish | undefined {
  return firmware.keypadRpm === undefined ? undefined : { source: 'keypad', rpm: firmware.keypadRpm, activeInput: 0 };
}

function timed(firmware: Firmware, settings: MotorSettings, at: number): Wish | undefined {
  if (firmware.timedEndsAt === undefined || settings.timed === null) return undefined;
  if (at < firmware.timedEndsAt) return { source: 'timed', rpm: settings.timed.rpm, activeInput: 0 };
  firmware.timedEndsAt = undefined;
  return undefined;
}

function program(settings: MotorSettings, model: MotorModel, on: readonly number[]): Wish | undefined {
  const speeds = on.map((index) => settings.program[index]?.rpm ?? 0);
  const rpm = model.programOverlap === 'higher-speed' ? Math.max(0, ...speeds) : (speeds[0] ?? 0);
  return rpm === 0 ? undefined : { source: 'program', rpm, activeInput: 0 };
}

/** Starts at the limit and looks again every hour. */
function freeze(firmware: Firmware, settings: MotorSettings, sensed: Sensed): Wish | undefined {
  if (settings.freeze === null) return undefined;
  if (firmware.freezeUntil === undefined || sensed.at >= firmware.freezeUntil) {
    firmware.freezeUntil = sensed.ambientCelsius <= settings.freeze.celsius ? sensed.at + HOUR_MS : undefined;
  }
  return firmware.freezeUntil === undefined
    ? undefined
    : { source: 'freeze', rpm: settings.freeze.rpm, activeInput: 0 };
}

function standStill(firmware: Firmware): void {
  firmware.running = false;
  firmware.primeEndsAt = undefined;
  firmware.pausedUntil = undefined;
  firmware.resting = false;
  firmware.tries = 0;
}

/** Any start from standstill primes first; a prime that was cut short starts again in full. */
function prime(firmware: Firmware, settings: MotorSettings, model: MotorModel, sensed: Sensed, wish: Wish): Command {
  const { at } = sensed;
  if (settings.prime === null) {
    firmware.running = true;
    return wish;
  }
  if (firmware.pausedUntil !== undefined) {
    if (at < firmware.pausedUntil) return pause(firmware, wish);
    firmware.pausedUntil = undefined;
    if (firmware.resting) firmware.tries = 0;
    firmware.resting = false;
  }
  if (!firmware.running) {
    firmware.running = true;
    firmware.tries += 1;
    firmware.primeEndsAt = at + settings.prime.seconds * 1000;
  }
  if (firmware.primeEndsAt === undefined) return wish;
  if (at < firmware.primeEndsAt) return { source: 'prime', rpm: settings.prime.rpm, activeInput: wish.activeInput };
  firmware.primeEndsAt = undefined;
  if (sensed.loaded || model.primeRetry === undefined) {
    firmware.tries = 0;
    return wish;
  }
  firmware.running = false;
  firmware.resting = firmware.tries >= model.primeRetry.tries;
  firmware.pausedUntil = at + (firmware.resting ? model.primeRetry.restMs : model.primeRetry.pauseMs);
  return pause(firmware, wish);
}

/** Between tries it says that it is priming; after the last one it says that it gave up, without a code. */
function pause(firmware: Firmware, wish: Wish): Command {
  return firmware.resting ? FAULTED : { source: 'prime', rpm: 0, activeInput: wish.activeInput };
}

/** When the firmware's own timers next change something, real ms. */
export function nextFirmwareChange(firmware: Firmware, at: number): number {
  let next = Number.POSITIVE_INFINITY;
  for (const time of [firmware.primeEndsAt, firmware.pausedUntil, firmware.timedEndsAt, firmware.freezeUntil]) {
    if (time !== undefined && time > at && time < next) next = time;
  }
  return next;
}
