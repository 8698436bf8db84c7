import type { Reading, Source } from '../readings/reading.ts';
import { HOUR_MS } from '../time/local-time.ts';
import type { ControlState } from './control-state.ts';
import type { MotorSettings, MotorTraits } from './motor-settings.ts';

/** A held keypad speed follows the shaft once it moves by this much, rpm. */
const KEYPAD_STEP_RPM = 20;

/**
 * Whether what a motor says commands it is believed. Only what the server cannot see is: keypad, timed run, freeze
 * protection, fault, stop and prime. A keypad or timed claim while a closed input wins is not, unless the model hears
 * the claim before its inputs. `winner` is the winning input, 0 = none.
 */
function believesClaim(claim: Source | undefined, winner: number, { precedence }: MotorTraits): boolean {
  if (claim === undefined || claim === 'input' || claim === 'program' || claim === 'off') return false;
  if (claim !== 'keypad' && claim !== 'timed') return true;
  return winner === 0 || precedence.indexOf(claim) < precedence.indexOf('input');
}

/** Follows since when the motor says that it primes, the keypad's held speed and the timed run's beginning. */
export function trackClaims(state: ControlState, reading: Reading, winner: number, traits: MotorTraits): void {
  const claim = reading.reportedSource;
  const believed = believesClaim(claim, winner, traits);
  state.primeSaidSince = claim === 'prime' ? (state.primeSaidSince ?? reading.at) : null;
  if (claim !== 'keypad' || !believed) state.keypadRpm = null;
  else if (state.keypadRpm === null || keypadMoved(state, reading)) state.keypadRpm = reading.rpm;
  if (claim === 'timed' && believed) {
    if (state.timedSince === null) state.timedSince = reading.at;
    else if (state.timedPausedAt !== null) state.timedSince += reading.at - state.timedPausedAt;
    state.timedPausedAt = null;
  } else if (traits.timedResumes && winner !== 0 && state.timedSince !== null) {
    state.timedPausedAt ??= reading.at;
  } else {
    state.timedSince = null;
    state.timedPausedAt = null;
  }
}

/** Whether the shaft has left the held keypad speed. */
export function keypadMoved(state: ControlState, reading: Reading): boolean {
  return state.keypadRpm !== null && Math.abs(reading.rpm - state.keypadRpm) >= KEYPAD_STEP_RPM;
}

/**
 * Follows freeze protection, which runs where `quiet` says that nothing else would: it starts at ambient at or below
 * its limit and is checked again every hour (10 CFR 431.485(d)). The hour is the motor's own, so one that already
 * stands in warmer air has had its check. A motor that says so itself is believed.
 */
export function trackFreeze(
  state: ControlState,
  reading: Reading,
  freeze: MotorSettings['freeze'],
  quiet: boolean,
): void {
  if (freeze === null || !quiet) {
    state.freezeSince = null;
    return;
  }
  const cold = reading.ambientCelsius !== undefined && reading.ambientCelsius <= freeze.celsius;
  const claimed = reading.reportedSource === 'freeze';
  const checkDue = state.freezeSince === null || reading.at >= state.freezeSince + HOUR_MS;
  if (checkDue) state.freezeSince = cold || claimed ? reading.at : null;
  else if (!cold && !claimed && state.standing && reading.ambientCelsius !== undefined) state.freezeSince = null;
}

/** Whether this reading may turn freeze protection on or off before its hour is over. */
export function freezeMayTurn(state: ControlState, reading: Reading, freeze: MotorSettings['freeze']): boolean {
  const ambient = reading.ambientCelsius;
  if (freeze === null || ambient === undefined) return false;
  if (state.freezeSince === null) return ambient <= freeze.celsius && state.dueSource === 'off';
  return ambient > freeze.celsius && state.standing;
}
