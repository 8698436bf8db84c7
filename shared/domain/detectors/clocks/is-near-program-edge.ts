import type { Facts } from '../facts.ts';

/**
 * Whether this reading lies within so many minutes of a change of the program's speed, on either side.
 *
 * @example isNearProgramEdge(facts, 10) // true at 6:04, where the program begins at 6:00
 */
export function isNearProgramEdge({ control, now }: Pick<Facts, 'control' | 'now'>, minutes: number): boolean {
  const near = minutes * 60_000;
  const { programEdgeBefore, programEdgeAfter } = control;
  if (programEdgeBefore !== undefined && now - programEdgeBefore < near) return true;
  return programEdgeAfter !== undefined && programEdgeAfter - now < near;
}
