import type { PlannedRun } from '#shared/contract/http/runs.ts';
import { plan } from '#shared/domain/control/plan.ts';
import type { PadState, PumpContext } from '#shared/domain/control/pump-context.ts';
import { recordedWindows } from '#shared/domain/control/window-spans.ts';

/** On pads in these states nothing is expected to run. */
const RESTING: readonly PadState[] = ['winterized', 'drained', 'repair', 'hold'];

/** The runs expected from now to the end of a window, by the commissioned settings and the recorded windows. */
export function planAhead(context: PumpContext, window: { from: number; until: number }, now: number): PlannedRun[] {
  const from = Math.max(now, window.from);
  if (from >= window.until || RESTING.includes(context.padState)) return [];
  const { settings, traits, zone } = context;
  const runs = plan(
    settings,
    traits,
    { zone, motorClockOffsetMinutes: 0 },
    from,
    window.until,
    recordedWindows(context.inputs),
  );
  return runs.map(({ because: _because, ...run }) => run);
}
