import { parseControlState } from '../control/control-state.ts';
import { motorClockOffset } from '../control/motor-clock-offset.ts';
import type { PumpContext } from '../control/pump-context.ts';
import type { InputWindow } from '../control/window-spans.ts';
import { createInputTracker } from '../detectors/inputs/input-tracker.ts';

/** What the fold knows of a pump that its plan rests on. */
export type PlanKnowledge = {
  /** How far the motor's clock is ahead of wall time, minutes; 0 where nothing is known. */
  readonly motorClockOffsetMinutes: number;
  /** When inputs close: by the trippers recorded of their clocks, else as learnt from when they did. */
  readonly windows: readonly InputWindow[];
};

/**
 * What a plan needs, from the parts `control` of a saved hot state and `inputs` of what was learnt. What cannot be read
 * back counts as not known.
 *
 * @example planKnowledge(context, undefined, undefined).motorClockOffsetMinutes // 0
 */
export function planKnowledge(context: PumpContext, control: unknown, inputs: unknown): PlanKnowledge {
  const state = parseControlState(control);
  const { windows } = createInputTracker(context, undefined, inputs).facts;
  return {
    motorClockOffsetMinutes: state === undefined ? 0 : motorClockOffset(state),
    windows: windows.flat().map(({ input, days, onMinute, offMinute }) => ({
      input,
      window: { days, onMinute: Math.round(onMinute), offMinute: Math.round(offMinute), opensEarlyMinutes: 0 },
    })),
  };
}
