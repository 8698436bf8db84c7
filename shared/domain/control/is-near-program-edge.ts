import { MINUTE_MS } from '../time/local-time.ts';
import type { ControlAnswer } from './control-answer.ts';

/**
 * Whether the last reading lies within so many minutes of a change of the program's speed, on either side, by the
 * motor's clock.
 *
 * @example isNearProgramEdge(control.push(reading), 10) // true at 6:04, where the program begins at 6:00
 */
export function isNearProgramEdge(
  { at, programEdgeBefore, programEdgeAfter }: Pick<ControlAnswer, 'at' | 'programEdgeBefore' | 'programEdgeAfter'>,
  minutes: number,
): boolean {
  const near = minutes * MINUTE_MS;
  if (programEdgeBefore !== undefined && at - programEdgeBefore <= near) return true;
  return programEdgeAfter !== undefined && programEdgeAfter - at <= near;
}
