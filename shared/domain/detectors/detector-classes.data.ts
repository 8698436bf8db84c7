import type { AlarmClass, Detector, Priority } from './detector.ts';

/** Class and priority with which a detector speaks unless its finding says otherwise. */
export const DETECTOR_CLASSES: Readonly<
  Record<Detector, { readonly alarmClass: AlarmClass; readonly priority: Priority }>
> = {
  'wrong-speed': { alarmClass: 'alarm', priority: 'soon' },
  'input-disagreement': { alarmClass: 'alarm', priority: 'soon' },
  'missing-input': { alarmClass: 'alarm', priority: 'soon' },
  'stuck-input': { alarmClass: 'note', priority: 'note' },
  'chattering-input': { alarmClass: 'alarm', priority: 'soon' },
  'failed-prime': { alarmClass: 'alarm', priority: 'urgent' },
  'slow-prime': { alarmClass: 'note', priority: 'note' },
  'loss-of-prime': { alarmClass: 'alarm', priority: 'urgent' },
  'low-load': { alarmClass: 'alarm', priority: 'soon' },
  'high-load': { alarmClass: 'alarm', priority: 'soon' },
  stopped: { alarmClass: 'alarm', priority: 'soon' },
  'unexpected-run': { alarmClass: 'alarm', priority: 'note' },
  'clock-shift': { alarmClass: 'note', priority: 'note' },
  'motor-clock': { alarmClass: 'note', priority: 'note' },
  'fed-through-clock': { alarmClass: 'alarm', priority: 'soon' },
  'keypad-hold': { alarmClass: 'note', priority: 'note' },
  'settings-changed': { alarmClass: 'note', priority: 'note' },
  'energized-without-flow': { alarmClass: 'alarm', priority: 'urgent' },
  'too-little-water': { alarmClass: 'note', priority: 'note' },
  freezing: { alarmClass: 'alarm', priority: 'urgent' },
  'supply-voltage': { alarmClass: 'alarm', priority: 'note' },
  'drive-fault': { alarmClass: 'alarm', priority: 'soon' },
  'drive-hot': { alarmClass: 'note', priority: 'note' },
  silent: { alarmClass: 'alarm', priority: 'note' },
  'clock-skew': { alarmClass: 'note', priority: 'note' },
  'costly-program': { alarmClass: 'note', priority: 'note' },
};
