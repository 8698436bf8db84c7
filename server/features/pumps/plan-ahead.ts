import type { PlannedRun } from '#shared/contract/http/runs.ts';
import { plan } from '#shared/domain/control/plan.ts';
import type { PadState, PumpContext } from '#shared/domain/control/pump-context.ts';
import { planKnowledge } from '#shared/domain/fold/plan-knowledge.ts';
import type { PlanKnowledgeRow } from './plan-knowledge-read-model.ts';

/** On pads in these states nothing is expected to run. */
const RESTING: readonly PadState[] = ['winterized', 'drained', 'repair', 'hold'];

/** What is planned of one pump, and by what. */
export type PlanAsked = {
  readonly context: PumpContext;
  /** What its fold has learnt; undefined before the first reading. */
  readonly known: PlanKnowledgeRow | undefined;
};

/**
 * The runs expected from now to the end of a window, by the commissioned settings, the clocks' recorded or learnt
 * windows and the motor's clock as it is known to go.
 */
export function planAhead(
  { context, known }: PlanAsked,
  window: { from: number; until: number },
  now: number,
): PlannedRun[] {
  const from = Math.max(now, window.from);
  if (from >= window.until || RESTING.includes(context.padState)) return [];
  const { settings, traits, zone } = context;
  const { motorClockOffsetMinutes, windows } = planKnowledge(context, known?.control, known?.inputs);
  const runs = plan(settings, traits, { zone, motorClockOffsetMinutes }, from, window.until, windows);
  return runs.map(({ because: _because, ...run }) => run);
}
