import { judgeSource } from '../control/judge-source.ts';
import type { Facts } from '../detectors/facts.ts';
import type { PumpNow } from './fold-output.ts';

/** What a screen's row shows of a pump, from the facts of its last reading. */
export function pumpNow({ reading, control, load, water, context }: Facts): PumpNow {
  const { due } = control;
  return {
    at: reading.at,
    rpm: reading.rpm,
    watts: reading.watts,
    closedInputs: reading.closedInputs,
    activeInput: reading.activeInput,
    source: control.rampOver ? judgeSource(reading.rpm, reading, control, context.settings) : control.decision.source,
    expectedSource: due.source,
    expectedRpm: due.source === 'keypad' ? reading.rpm : due.rpm,
    because: control.decision.because,
    until: control.decision.until,
    lockedBy: control.decision.lockedBy,
    primed: load.primed,
    flow: water.gpm >= 0 ? { gpm: water.gpm, sigmaGpm: water.gpm * water.sigmaShare } : undefined,
  };
}
