import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL } from '../judgement.ts';

/** The code seen last, whether the reading before had one, and when faults began within the last day. */
type State = { code: string; faulted: boolean; begins: number[]; stoppedSince: number };

function judge(state: State, { reading, control, now }: Facts): Judgement {
  const { fault } = reading;
  const faulted = fault !== undefined && fault !== '';
  if (!faulted) {
    state.faulted = false;
    return NORMAL;
  }
  if (!state.faulted) {
    state.begins = [...state.begins.filter((began) => now - began < 86_400_000), now].slice(-5);
    state.stoppedSince = 0;
  }
  if (!control.standing) state.stoppedSince = 0;
  else if (state.stoppedSince === 0) state.stoppedSince = now;
  state.faulted = true;
  state.code = fault;
  return ABNORMAL;
}

function describe(state: State, facts: Facts, parameters: RuleParameters<'drive-fault'>, { onset }: Spoken): Finding {
  const { control, now, reading } = facts;
  const stopped = control.standing && state.stoppedSince !== 0;
  const stoppedMs = stopped ? now - state.stoppedSince : 0;
  const within = parameters.urgentWithinHours * 3_600_000;
  const faults = state.begins.filter((began) => now - began < within).length;
  const urgent = stoppedMs >= parameters.urgentStoppedSeconds * 1000 || faults >= parameters.urgentFaults;
  return {
    cause: state.code,
    priority: urgent ? 'urgent' : 'soon',
    evidence: {
      fault: state.code,
      minutes: Math.round((now - onset) / 60_000),
      stoppedMinutes: Math.round(stoppedMs / 60_000),
      faultsInDay: faults,
      rpm: reading.rpm,
      driveCelsius: reading.driveCelsius ?? null,
      volts: reading.volts ?? null,
    },
  };
}

export const driveFault = defineDetector<'drive-fault', State>({
  detector: 'drive-fault',
  hears: ['reading'],
  initial: () => ({ code: '', faulted: false, begins: [], stoppedSince: 0 }),
  judge,
  describe,
});
