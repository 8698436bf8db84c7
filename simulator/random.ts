/** Seeded chance. The same seed gives the same numbers on every machine. */
export type Random = {
  /** Uniform in [0, 1). */
  readonly next: () => number;
  readonly between: (low: number, high: number) => number;
  /** A whole number, both ends included. */
  readonly integer: (low: number, high: number) => number;
  /** Normally distributed with mean 0 and standard deviation 1. */
  readonly normal: () => number;
  readonly chance: (probability: number) => boolean;
  readonly pick: <T>(list: readonly [T, ...T[]]) => T;
  /** A stream of its own, which does not move this one. */
  readonly fork: (name: string) => Random;
};

/** 32-bit FNV-1a hash of a text; offset basis and prime as published by Fowler, Noll and Vo. */
export function hashText(text: string): number {
  let hash = 0x811c9dc5;
  for (let index = 0; index < text.length; index += 1) {
    hash = Math.imul(hash ^ text.charCodeAt(index), 0x01000193);
  }
  return hash >>> 0;
}

/** Creates a stream of chance (mulberry32, a 32-bit generator in the public domain) from a text. */
export function createRandom(seed: string): Random {
  let state = hashText(seed);
  const next = () => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
  const between = (low: number, high: number) => low + (high - low) * next();
  const integer = (low: number, high: number) => low + Math.floor(next() * (high - low + 1));
  return {
    next,
    between,
    integer,
    // The sum of three uniforms, scaled: cheap, bounded by three, close enough to normal for a meter's noise.
    normal: () => (next() + next() + next() - 1.5) * 2,
    chance: (probability) => next() < probability,
    pick: (list) => list[integer(0, list.length - 1)] ?? list[0],
    fork: (name) => createRandom(`${seed}/${name}`),
  };
}
