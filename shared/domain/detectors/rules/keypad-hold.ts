import { defineDetector, type Finding } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

/** Since when it is on manual; 0 = it is not. */
type State = { since: number };
type Parameters = RuleParameters<'keypad-hold'>;

/**
 * On manual for twelve hours, or still half an hour after our own visit ended. A closed input or a prime only
 * interrupts it: afterwards it is on manual as before.
 */
function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const { source } = facts.control.decision;
  if (source === 'input' || source === 'prime') return UNJUDGED;
  if (source !== 'keypad') {
    state.since = 0;
    return NORMAL;
  }
  if (state.since === 0) state.since = facts.now;
  return heldTooLong(state, facts, parameters) ? ABNORMAL : NORMAL;
}

function heldTooLong({ since }: State, { now, onSite, onSiteEndedAt }: Facts, parameters: Parameters): boolean {
  if (now - since >= parameters.delaySeconds * 1000) return true;
  const ours = onSiteEndedAt !== 0 && since < onSiteEndedAt && !onSite;
  return ours && now - onSiteEndedAt >= parameters.afterCallSeconds * 1000;
}

function describe({ since }: State, { now, reading, onSiteEndedAt }: Facts): Finding {
  return {
    cause: 'unknown',
    from: since,
    evidence: {
      minutes: Math.round((now - since) / 60_000),
      measuredRpm: Math.round(reading.rpm),
      sinceOurVisit: onSiteEndedAt !== 0 && since < onSiteEndedAt,
    },
  };
}

export const keypadHold = defineDetector<'keypad-hold', State>({
  detector: 'keypad-hold',
  hears: ['reading'],
  initial: () => ({ since: 0 }),
  judge,
  // The rule counts from the moment it went on manual.
  delaySeconds: () => 0,
  describe,
});
