import type { KnownWindow } from './known-window.ts';

/** What the speed inputs do, for the rules. Masks: bit 0 = input 1; lists: index 0 = input 1; times ms, 0 = not. */
export type InputFacts = {
  /** Inputs that have a speed. */
  wired: number;
  /** Closed or opened since the reading before; 0 across a gap, where nobody saw the edge. */
  closedEdges: number;
  openedEdges: number;
  /** Since when each input is closed, and whether its closing was seen. */
  readonly closedSince: number[];
  readonly edgeSeen: boolean[];
  /** When each input last closed and last opened, as far as that is known. */
  readonly lastOnAt: number[];
  readonly lastOffAt: number[];
  /** Inputs whose closing was seen and has just lasted ten minutes: an edge of a clock and no bounce. */
  settledOn: number;
  /** Local time of day at which each of them closed, minutes. */
  readonly onMinute: number[];
  /** The hours each input's clock is known for; recorded ones where there are any, else learnt ones. */
  readonly windows: (readonly KnownWindow[])[];
  /** They changed with this reading, or are new to this fold. */
  windowsChanged: boolean;
};

/** The motor inputs that the wire can speak of. */
export const INPUT_COUNT = 8;

/** A list with one value an input. */
export function perInput<Value>(value: () => Value): Value[] {
  return Array.from({ length: INPUT_COUNT }, value);
}
