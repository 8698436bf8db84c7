import type { RunSourceName } from '#shared/contract/http/runs.ts';
import { listClosed } from '#src/lib/list-closed.ts';
import type { StripRun } from './strip-run.ts';

/** How a run is inked. Who commands the speed is told by texture, never by hue. */
export type Texture = 'none' | 'wash' | 'hatch' | 'cross' | 'dots' | 'prime' | 'dashes' | 'gap';

const OF_SOURCE: Readonly<Record<RunSourceName, Texture>> = {
  off: 'none',
  stop: 'none',
  fault: 'none',
  program: 'wash',
  unknown: 'wash',
  input: 'hatch',
  keypad: 'dots',
  timed: 'dots',
  prime: 'prime',
  freeze: 'dashes',
  'no-data': 'gap',
};

export function textureOf(run: Pick<StripRun, 'source' | 'closedInputs'>): Texture {
  const texture = OF_SOURCE[run.source];
  return texture === 'hatch' && listClosed(run.closedInputs).length > 1 ? 'cross' : texture;
}

/**
 * The slope of an input's hatch in degrees, clockwise from upright bars: each input of a motor has its own direction,
 * neighbours lean opposite ways. A small numeral says which it is for certain.
 *
 * @example hatchAngle(1) // 45
 * @example hatchAngle(2) // -45
 */
export function hatchAngle(input: number): number {
  const steepness = [45, 70, 20, 58][Math.floor((Math.max(1, input) - 1) / 2) % 4] ?? 45;
  return input % 2 === 1 ? steepness : -steepness;
}
