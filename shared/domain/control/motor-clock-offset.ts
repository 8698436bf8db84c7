import { clockDifference } from '../time/clock-time.ts';
import { DAY_MS, MINUTE_MS } from '../time/local-time.ts';
import type { ControlState } from './control-state.ts';

/** A clock that shows whole minutes leaves this much doubt, minutes. */
const DOUBT_MINUTES = 1.5;
/** Nearer than this the clock shows what is held of it; just under the minute at which doubt begins. */
const CERTAIN_MINUTES = 0.99;

/**
 * How far the motor's clock is ahead of wall time, minutes: as it says, else as learnt, else zero.
 *
 * @example motorClockOffset({ ...state, saidOffset: undefined, learntOffset: -4 }) // -4
 */
export function motorClockOffset(state: ControlState): number {
  return state.saidOffset ?? state.learntOffset ?? 0;
}

/**
 * Takes in what the motor's own clock shows (`minute`, 0 to 1439, whole) at an instant. Answers whether the offset
 * changed. A new offset counts once two readings agree on it, at once when there was none or when the wall clock's
 * own shift explains it (a motor knows no daylight saving).
 */
export function followMotorClock(state: ControlState, minute: number, at: number, zoneOffset: number): boolean {
  const wallMs = at + zoneOffset * MINUTE_MS;
  const wallMinute = (wallMs - Math.floor(wallMs / DAY_MS) * DAY_MS) / MINUTE_MS;
  const held = motorClockOffset(state);
  const ahead = minute - wallMinute + 0.5;
  // Most readings say what is known: no need to go round the clock for them.
  const doubt = Math.abs(held - ahead) < CERTAIN_MINUTES ? 0 : clockDifference(ahead, held);
  const heldFor = state.zoneOffset;
  state.zoneOffset = zoneOffset;
  if (Math.abs(doubt) <= 1) {
    state.doubtedOffset = null;
    if (state.saidOffset !== null) return false;
    state.saidOffset = held;
    return false;
  }
  if (!Number.isFinite(doubt)) return false;
  // Of the minute's width that the clock can be off by, the whole number: clocks are set, and shifted, by those.
  const offset = Math.ceil(clockDifference(wallMinute, minute) - 1e-6) + 0;
  const shifted = heldFor !== null && near(offset, held + heldFor - zoneOffset);
  const agreed = state.doubtedOffset !== null && near(offset, state.doubtedOffset);
  if (state.saidOffset !== null && !shifted && !agreed) {
    state.doubtedOffset = offset;
    return false;
  }
  state.saidOffset = offset;
  state.doubtedOffset = null;
  return true;
}

function near(left: number, right: number): boolean {
  return Math.abs(clockDifference(left, right)) <= DOUBT_MINUTES;
}
