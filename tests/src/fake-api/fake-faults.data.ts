import type { Alarm } from '#shared/contract/http/alarms.ts';
import type { Detector, Priority } from '#shared/domain/detectors/detector.ts';

/** What is wrong at one pump of the fake fleet: hours before now, and how its runs look since then. */
export type FakeFault = {
  readonly serial: string;
  readonly detector: Detector;
  readonly cause: string;
  readonly alarmClass: 'alarm' | 'note';
  readonly priority: Priority;
  readonly evidence: Alarm['evidence'];
  readonly hoursAgo: number;
  readonly acknowledged?: boolean;
  readonly runs?: 'unprimed' | 'program-speed' | 'silent' | 'standing';
};

export const FAKE_FAULTS: readonly FakeFault[] = [
  {
    serial: 'MR-000101',
    detector: 'failed-prime',
    cause: 'air-leak',
    alarmClass: 'alarm',
    priority: 'urgent',
    evidence: { tries: 3, watts: 412, primedWatts: 1450, rpm: 3450 },
    hoursAgo: 11.2,
    runs: 'unprimed',
  },
  {
    serial: 'MR-000102',
    detector: 'wrong-speed',
    cause: 'ignores-input',
    alarmClass: 'alarm',
    priority: 'soon',
    evidence: { input: 1, measuredRpm: 1700, expectedRpm: 2850 },
    hoursAgo: 3.4,
    runs: 'program-speed',
  },
  {
    serial: 'MR-000103',
    detector: 'low-load',
    cause: 'slow',
    alarmClass: 'alarm',
    priority: 'soon',
    evidence: { drop: 0.41 },
    hoursAgo: 40,
    acknowledged: true,
  },
  {
    serial: 'MR-000104',
    detector: 'silent',
    cause: 'link',
    alarmClass: 'alarm',
    priority: 'note',
    evidence: { minutes: 612 },
    hoursAgo: 10.2,
    runs: 'silent',
  },
  {
    serial: 'MR-000105',
    detector: 'clock-shift',
    cause: 'power-cut',
    alarmClass: 'note',
    priority: 'note',
    evidence: { input: 2, minutes: 100 },
    hoursAgo: 50,
    acknowledged: true,
  },
  {
    serial: 'MR-000111',
    detector: 'motor-clock',
    cause: 'drift',
    alarmClass: 'note',
    priority: 'note',
    evidence: { minutes: 37, direction: 'slow' },
    hoursAgo: 6,
    acknowledged: true,
  },
  {
    serial: 'MR-000125',
    detector: 'stopped',
    cause: 'keypad-stop',
    alarmClass: 'alarm',
    priority: 'soon',
    evidence: { expectedRpm: 1700 },
    hoursAgo: 4,
    runs: 'standing',
  },
  {
    serial: 'MR-000128',
    detector: 'keypad-hold',
    cause: 'unknown',
    alarmClass: 'note',
    priority: 'note',
    evidence: { minutes: 790 },
    hoursAgo: 13,
  },
];
