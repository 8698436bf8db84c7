import { CAUSES_SAID } from './causes-said.data.ts';
import type { AlarmEvidence } from './signs-of-evidence.ts';

/**
 * The detector's own cause under the name it has in the table of causes. Some detectors name none, but their figures
 * leave only one: a pump in frost whose display says stop was stopped by hand.
 *
 * @example causeSaid({ detector: 'wrong-speed', cause: 'ignores-input', evidence: {} }) // 'input-wiring'
 */
export function causeSaid({ detector, cause, evidence }: AlarmEvidence): string {
  if (detector === 'freezing') return freezingCause(evidence);
  if (detector === 'keypad-hold' && evidence.sinceOurVisit === true) return 'left-on-manual-by-us';
  return CAUSES_SAID[detector]?.[cause] ?? cause;
}

function freezingCause({ saysSource, protectionSet }: AlarmEvidence['evidence']): string {
  if (saysSource === 'fault') return 'fault';
  if (saysSource === 'stop') return 'stopped-by-hand';
  return protectionSet === false ? 'protection-off' : 'unknown';
}
