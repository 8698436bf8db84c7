import type { PlayedDevice } from './played-device.ts';

/** What a ticking device said, one reading at a time. */
export type Ticking = {
  /** Stops, and resolves with the device times of everything said, once all of it is stored. */
  readonly settle: () => Promise<number[]>;
  readonly lastRpm: () => number;
};

const TICK_MS = 500;
/** A speed is held for so many readings, then another one is commanded: each opens a run. */
const HELD_TICKS = 6;
const SPEEDS = [
  { rpm: 1500, src: 'program' },
  { rpm: 2100, src: 'keypad' },
] as const;

/** Lets a device say its speed twice a second, changing what commands it every three, whatever happens to the server. */
export function tick(device: PlayedDevice): Ticking {
  const stored: Promise<number>[] = [];
  let rpm = 0;
  const say = () => {
    const turn = Math.floor(stored.length / HELD_TICKS);
    const { rpm: speed, src } = SPEEDS[turn % SPEEDS.length] ?? SPEEDS[0];
    // Every reading is one that no other is: the screen tells how far it has come.
    rpm = speed + (stored.length % 19);
    const t = Date.now();
    stored.push(device.publish([{ t, rpm, w: 320, src }]).then(() => t));
  };
  say();
  const timer = setInterval(say, TICK_MS);
  return {
    lastRpm: () => rpm,
    settle: async () => {
      clearInterval(timer);
      return Promise.all(stored);
    },
  };
}
