import type { PlayedDevice } from './played-device.ts';

/** One reading that a ticking device said: its device time, ms, and the speed, rpm. */
export type Said = { readonly t: number; readonly rpm: number };

/** What a ticking device said, one reading at a time. */
export type Ticking = {
  /** Stops, and resolves with everything said, in order, once all of it is stored. */
  readonly settle: () => Promise<Said[]>;
  /** Says nothing more; what it said may be on its way still. */
  readonly stop: () => void;
  readonly lastRpm: () => number;
  /** How often what commands the device has changed, the first command counted: each opens a run. */
  readonly turns: () => number;
};

const TICK_MS = 500;
/** A speed is held for so many readings, then another one is commanded: each opens a run. */
export const HELD_TICKS = 6;
const SPEEDS = [
  { rpm: 1500, src: 'program' },
  { rpm: 2100, src: 'keypad' },
] as const;

/** Lets a device say its speed twice a second, changing what commands it every three, whatever happens to the server. */
export function tick(device: PlayedDevice): Ticking {
  const stored: Promise<Said>[] = [];
  let rpm = 0;
  const say = () => {
    const turn = Math.floor(stored.length / HELD_TICKS);
    const { rpm: speed, src } = SPEEDS[turn % SPEEDS.length] ?? SPEEDS[0];
    // Every reading is one that no other is: the screen tells how far it has come.
    rpm = speed + (stored.length % 19);
    const said = { t: Date.now(), rpm };
    const told = device.publish([{ ...said, w: 320, src }]).then(() => said);
    // Whoever settles hears of a failure; a test that failed before does not.
    told.catch(() => undefined);
    stored.push(told);
  };
  say();
  const timer = setInterval(say, TICK_MS);
  const stop = () => clearInterval(timer);
  return {
    stop,
    lastRpm: () => rpm,
    turns: () => Math.ceil(stored.length / HELD_TICKS),
    settle: async () => {
      stop();
      return Promise.all(stored);
    },
  };
}
