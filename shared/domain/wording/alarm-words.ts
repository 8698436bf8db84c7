import type { Detector, Evidence } from '../detectors/detector.ts';
import { alarmTitle } from './alarm-title.ts';
import { ALARM_WORDING, type AlarmWording, type Look } from './alarm-wording.data.ts';
import { CAUTIONS, type Task } from './cautions.data.ts';
import { fillTemplate } from './fill-template.ts';

export { alarmTitle };

/** Everything a person is told of an alarm, ready to print. */
export type AlarmWords = {
  readonly title: string;
  readonly meaning: string;
  readonly homeowner: string;
  readonly look: readonly Look[];
  readonly task: Task;
  readonly cautions: readonly string[];
};

const choose = <Key extends keyof AlarmWording>(detector: Detector, cause: string, key: Key): AlarmWording[Key] =>
  ALARM_WORDING[detector].causes[cause]?.[key] ?? ALARM_WORDING[detector][key];

/**
 * Title, meaning, what to look at first and the cautions of an alarm. An unknown cause gets the detector's own words.
 *
 * @example alarmWords('failed-prime', 'air-leak', { tries: 3 }).look[0]?.what // 'Lid and O-ring: seated, dry, no hiss'
 */
export function alarmWords(detector: Detector, cause: string, evidence: Evidence): AlarmWords {
  const task = choose(detector, cause, 'task');
  return {
    title: alarmTitle(detector, cause, evidence),
    meaning:
      fillTemplate(choose(detector, cause, 'meaning'), evidence) ??
      choose(detector, cause, 'meaning').replaceAll(/\s*\{[^}]*\}/g, ''),
    homeowner: choose(detector, cause, 'homeowner'),
    look: choose(detector, cause, 'look'),
    task,
    cautions: CAUTIONS[task].lines,
  };
}
