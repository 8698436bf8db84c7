import type { Reading, RunSource } from '../readings/reading.ts';
import type { Decision } from './decision.ts';
import type { MotorSettings } from './motor-settings.ts';
import { fitsSpeed, STANDSTILL_RPM } from './speed-tolerance.ts';

/** What control answered, as far as judging needs it. */
type Judged = Readonly<Record<'decision' | 'due', Pick<Decision, 'source' | 'rpm'>>>;

/**
 * What a motor is judged to be doing at a settled speed (rpm): what commands it where the speed fits, else the source
 * whose speed it is, `unknown` where it is nobody's. A standing motor is `off`, unless a believed keypad stop or
 * fault holds it.
 *
 * @example judgeSource(1700, reading, answer, settings) // 'program', also while a closed input calls for more
 */
export function judgeSource(
  rpm: number,
  reading: Pick<Reading, 'closedInputs' | 'reportedSource'>,
  { decision, due }: Judged,
  settings: MotorSettings,
): RunSource {
  if (rpm <= STANDSTILL_RPM) return decision.source === 'stop' || decision.source === 'fault' ? decision.source : 'off';
  if (decision.rpm > 0 && fitsSpeed(rpm, decision.rpm)) return decision.source;
  if (due.rpm > 0 && fitsSpeed(rpm, due.rpm)) return due.source;
  const { inputs, program, prime, timed, freeze } = settings;
  const fitsInput = (closed: boolean): boolean =>
    inputs.some(
      (speed, index) =>
        speed !== null && closed === ((reading.closedInputs & (1 << index)) !== 0) && fitsSpeed(rpm, speed),
    );
  if (fitsInput(true)) return 'input';
  if (program.some((entry) => fitsSpeed(rpm, entry.rpm))) return 'program';
  const said = reading.reportedSource;
  // A motor that says nothing may have started before its time: its prime is the likeliest.
  if ((said === 'prime' || said === undefined) && prime !== null && fitsSpeed(rpm, prime.rpm)) return 'prime';
  if (said === 'timed' && timed !== null && fitsSpeed(rpm, timed.rpm)) return 'timed';
  if (said === 'freeze' && freeze !== null && fitsSpeed(rpm, freeze.rpm)) return 'freeze';
  return fitsInput(false) ? 'input' : 'unknown';
}
