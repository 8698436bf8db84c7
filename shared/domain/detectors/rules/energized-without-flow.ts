import { listClosedInputs } from '#shared/domain/control/winning-input.ts';
import { defineDetector, type Finding, type Spoken } from '../define-detector.ts';
import { listEnergized } from '../energized-equipment.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

type State = Record<string, never>;

/**
 * A closed input whose clock also feeds a heater, cell or feeder without an interlock of its own, while the pump
 * stands or carries no load. A load that is not known yet is given the benefit of the doubt.
 */
function judge(_: State, facts: Facts): Judgement {
  const { control, load, context } = facts;
  if (context.equipment.length === 0) return NORMAL;
  if (control.standing) return listEnergized(facts).length > 0 ? ABNORMAL : NORMAL;
  if (load.primed === undefined) return UNJUDGED;
  return (load.dry || !load.primed) && listEnergized(facts).length > 0 ? ABNORMAL : NORMAL;
}

function describe(_: State, facts: Facts, __: object, { onset }: Spoken): Finding {
  const { reading, control, load, now } = facts;
  const energized = listEnergized(facts);
  return {
    cause: energized[0] ?? 'unknown',
    evidence: {
      equipment: energized[0] ?? null,
      energized,
      input: control.winningInput === 0 ? (listClosedInputs(reading.closedInputs)[0] ?? null) : control.winningInput,
      closedInputs: listClosedInputs(reading.closedInputs),
      rpm: Math.round(reading.rpm),
      watts: reading.watts,
      loadShare: Number.isFinite(load.ratio) ? Math.round(load.ratio * 100) / 100 : null,
      minutes: Math.round((now - onset) / 60_000),
    },
  };
}

export const energizedWithoutFlow = defineDetector<'energized-without-flow', State>({
  detector: 'energized-without-flow',
  hears: ['reading'],
  initial: () => ({}),
  judge,
  describe,
});
