import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

/** `deratedDays` are local days on which the drive ran slower than asked, hot, for long enough. */
type State = { hot: boolean; deratedDay: number; deratedMs: number; deratedDays: number[] };
type Parameters = RuleParameters<'drive-hot'>;

function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { driveCelsius } = facts.reading;
  if (driveCelsius === undefined) return UNJUDGED;
  const limit = facts.context.traits.driveHotCelsius;
  state.hot = driveCelsius > limit - (state.hot ? parameters.deadbandCelsius : 0);
  if (state.hot) countDerating(state, facts, parameters);
  return state.hot ? ABNORMAL : NORMAL;
}

function countDerating(state: State, { control, localDay, elapsedMs, gap }: Facts, parameters: Parameters): void {
  if (gap || control.standing || !control.rampOver || !control.offExpected || control.rpm > control.due.rpm) return;
  if (state.deratedDay !== localDay) {
    state.deratedDay = localDay;
    state.deratedMs = 0;
  }
  state.deratedMs += elapsedMs;
  if (state.deratedMs < parameters.deratedHours * 3_600_000 || state.deratedDays.at(-1) === localDay) return;
  state.deratedDays = [...state.deratedDays, localDay].slice(-7);
}

function describe(state: State, facts: Facts, parameters: Parameters, { onset }: Spoken): Finding {
  const { reading, context, now, localDay } = facts;
  const days = state.deratedDays.filter((day) => localDay - day < 7).length;
  return {
    cause: 'unknown',
    priority: days >= parameters.deratedDays ? 'soon' : 'note',
    evidence: {
      driveCelsius: reading.driveCelsius ?? null,
      limitCelsius: context.traits.driveHotCelsius,
      ambientCelsius: reading.ambientCelsius ?? null,
      minutes: Math.round((now - onset) / 60_000),
      deratedDays: days,
    },
  };
}

export const driveHot = defineDetector<'drive-hot', State>({
  detector: 'drive-hot',
  hears: ['reading'],
  initial: () => ({ hot: false, deratedDay: 0, deratedMs: 0, deratedDays: [] }),
  judge,
  describe,
});
