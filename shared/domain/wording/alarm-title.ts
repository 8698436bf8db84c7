import type { Detector, Evidence } from '../detectors/detector.ts';
import { ALARM_TITLES } from './alarm-titles.data.ts';
import { fillTemplate } from './fill-template.ts';

/**
 * The short title of an alarm, with the evidence's numbers where it has them.
 *
 * @example alarmTitle('failed-prime', 'air-leak', { tries: 3 }) // 'Did not prime, 3 tries'
 * @example alarmTitle('failed-prime', 'air-leak', {}) // 'Did not prime'
 */
export function alarmTitle(detector: Detector, cause: string, evidence: Evidence): string {
  const { titles, causes } = ALARM_TITLES[detector];
  const own = Object.hasOwn(causes, cause) ? causes[cause] : undefined;
  for (const title of [...(own ?? []), ...titles]) {
    const filled = fillTemplate(title, evidence);
    if (filled !== undefined) return filled;
  }
  return detector;
}
