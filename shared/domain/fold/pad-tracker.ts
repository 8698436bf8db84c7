import type { PadState, PumpContext } from '../control/pump-context.ts';
import { PAD_STATES } from '../control/pump-context.ts';
import { copyJson, type Json, restoreState } from '../detectors/plain-state.ts';
import type { PumpEvent } from './pump-event.ts';

type PadMemory = { state: string; commissioned: string; onSiteSince: number; onSiteEndedAt: number };

/** On-site mode ends by itself after this long, ms; saying it again begins anew. */
const LONGEST_VISIT_MS = 90 * 60_000;

/** Follows what people say of a pad: its state, and whether one of ours stands at it. */
export type PadTracker = {
  /** Takes an event in; answers whether anything changed. */
  readonly hear: (event: PumpEvent) => boolean;
  readonly state: () => PadState;
  readonly onSite: () => boolean;
  readonly onSiteEndedAt: () => number;
  readonly save: () => Json;
};

/**
 * A tracker that goes on from what was saved. A pad state heard as an event holds until the commissioned one changes.
 *
 * @example createPadTracker(context, undefined).state() // 'open'
 */
export function createPadTracker(context: PumpContext, saved: unknown): PadTracker {
  const fresh: PadMemory = {
    state: context.padState,
    commissioned: context.padState,
    onSiteSince: 0,
    onSiteEndedAt: 0,
  };
  const memory = restoreState(fresh, saved);
  if (memory.commissioned !== context.padState) {
    memory.state = context.padState;
    memory.commissioned = context.padState;
  }
  let state = parsePadState(memory.state, context.padState);
  return {
    hear: (event) => {
      const { receivedAt, kind } = event;
      if (memory.onSiteSince === 0 && kind !== 'on-site' && kind !== 'pad-state') return false;
      if (memory.onSiteSince !== 0 && receivedAt - memory.onSiteSince > LONGEST_VISIT_MS) {
        memory.onSiteEndedAt = memory.onSiteSince + LONGEST_VISIT_MS;
        memory.onSiteSince = 0;
      }
      if (event.kind === 'pad-state') {
        state = event.state;
        memory.state = event.state;
      }
      if (event.kind === 'on-site') {
        if (!event.on && memory.onSiteSince !== 0) memory.onSiteEndedAt = receivedAt;
        memory.onSiteSince = event.on ? receivedAt : 0;
      }
      return true;
    },
    state: () => state,
    onSite: () => memory.onSiteSince !== 0,
    onSiteEndedAt: () => memory.onSiteEndedAt,
    save: () => copyJson(memory),
  };
}

function parsePadState(value: string, otherwise: PadState): PadState {
  return PAD_STATES.find((state) => state === value) ?? otherwise;
}
