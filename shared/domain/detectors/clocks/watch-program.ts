import type { PumpContext } from '#shared/domain/control/pump-context.ts';
import { fitsSpeed } from '#shared/domain/control/speed-tolerance.ts';
import { DAY_MINUTES } from '#shared/domain/time/local-time.ts';
import type { Facts } from '../facts.ts';
import type { ProgramEdge } from './program-edges.ts';

/**
 * The program speed that a motor was last seen to hold, rpm, 0 = standing, null = not known; and when it left that,
 * ms (0 = it has not) with the minute of the week.
 */
export type ProgramWatch = { speed: number | null; leftAt: number; leftMinute: number };

/** Inputs must have been open for this long, or the motor was following them, ms. */
const OPEN_FOR_MS = 600_000;
/** From one speed to the next, ms; a start takes its prime longer. */
const CHANGE_MS = 120_000;

/**
 * Follows one reading; answers the change of program speed that is complete with it, dated from when the old speed was
 * left. What somebody commands by hand, or an input, is no change of the program.
 */
export function watchProgram(watch: ProgramWatch, facts: Facts): ProgramEdge | undefined {
  const { reading, gap, control, now, context } = facts;
  if (gap || !isOfProgram(facts)) {
    watch.speed = null;
    watch.leftAt = 0;
    return undefined;
  }
  const { speed } = watch;
  if (speed !== null && (speed === 0 ? control.standing : fitsSpeed(reading.rpm, speed))) {
    watch.leftAt = 0;
    return undefined;
  }
  if (speed !== null && watch.leftAt === 0) {
    watch.leftAt = now;
    watch.leftMinute = facts.localWeekday * DAY_MINUTES + facts.localMinute;
  }
  const next = programSpeedOf(facts);
  if (next === undefined) {
    const allowed = CHANGE_MS + (speed === 0 ? (context.settings.prime?.seconds ?? 0) * 1000 : 0);
    if (speed !== null && now - watch.leftAt > allowed) watch.speed = null;
    return undefined;
  }
  const edge = speed === null ? undefined : { minute: watch.leftMinute, from: speed, to: next };
  watch.speed = next;
  watch.leftAt = 0;
  return edge;
}

function isOfProgram({ reading, inputs, now }: Facts): boolean {
  const { reportedSource: source, closedInputs } = reading;
  const byProgram = source === undefined || source === 'program' || source === 'prime' || source === 'off';
  return byProgram && closedInputs === 0 && inputs.lastOffAt.every((at) => now - at >= OPEN_FOR_MS);
}

function programSpeedOf({ reading, control, context }: Facts): number | undefined {
  if (control.standing) return 0;
  if (reading.reportedSource === 'prime' || control.due.source === 'prime') return undefined;
  return listSpeeds(context).find((rpm) => fitsSpeed(reading.rpm, rpm));
}

const listSpeeds = ({ settings }: PumpContext): readonly number[] => settings.program.map(({ rpm }) => rpm);
