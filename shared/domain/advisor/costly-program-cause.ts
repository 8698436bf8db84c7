import type { ProgramPlan } from './advise-program.ts';

/** What of a program costs too much. `unknown` where the two programs differ in nothing clearly. */
export type CostlyCause = 'dear-hours' | 'hours-too-long' | 'speed-too-high' | 'unknown';

type Figures = Pick<ProgramPlan, 'kwhPerWeek' | 'gallonsPerWeek' | 'microsPerWeek'>;

/** So much of the saving comes from a lower price of the same energy, or the program moves so much more water. */
const MOSTLY_SHARE = 0.5;
const MORE_WATER = 1.25;

/**
 * Names what makes a program dear: its hours, where the same energy at other hours is most of the saving; too many
 * hours, where it moves a quarter more water than was asked for; else its speed, since power goes with the cube of it.
 *
 * @example costlyProgramCause(before, after) // 'speed-too-high'
 * Source: affinity laws; shares by common practice.
 */
export function costlyProgramCause(before: Figures, after: Figures): CostlyCause {
  const saved = before.microsPerWeek - after.microsPerWeek;
  if (!(saved > 0 && before.kwhPerWeek > 0 && before.microsPerWeek > 0)) return 'unknown';
  // What is left of the saving when the energy saved is paid at the present mean price.
  const byEnergy = Math.max(0, 1 - after.kwhPerWeek / before.kwhPerWeek) * before.microsPerWeek;
  if (saved - byEnergy > MOSTLY_SHARE * saved) return 'dear-hours';
  return before.gallonsPerWeek > MORE_WATER * after.gallonsPerWeek ? 'hours-too-long' : 'speed-too-high';
}
