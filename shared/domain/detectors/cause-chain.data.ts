import type { Detector } from './detector.ts';

/**
 * The order in which detectors are heard: the first that stands wins and the rest are its consequences. Those that
 * belong to no chain come last.
 */
export const CAUSE_CHAIN: readonly Detector[] = [
  'fed-through-clock',
  'silent',
  'drive-fault',
  'freezing',
  'energized-without-flow',
  'stopped',
  'unexpected-run',
  'failed-prime',
  'loss-of-prime',
  'motor-clock',
  'clock-shift',
  'missing-input',
  'input-disagreement',
  'settings-changed',
  'wrong-speed',
  'low-load',
  'high-load',
  'too-little-water',
  'stuck-input',
  'chattering-input',
  'slow-prime',
  'keypad-hold',
  'supply-voltage',
  'drive-hot',
  'clock-skew',
  'costly-program',
];

const NO_WATER: readonly Detector[] = ['loss-of-prime', 'wrong-speed', 'low-load', 'high-load', 'too-little-water'];
const NOT_RUNNING: readonly Detector[] = ['failed-prime', 'input-disagreement', ...NO_WATER];

/**
 * While a detector stands, these are its consequences: they stay silent. One that spoke first stands until its own
 * condition ends: a pump that failed to prime does not prime because its heater is on too.
 * Notes that stand for days (a wrong clock, changed settings, a missing input) explain only what they can cause, so
 * that they hide no new fault; what depends on the input or on the speed is decided in the consequence's own rule.
 */
export const CONSEQUENCES: Readonly<Partial<Record<Detector, readonly Detector[]>>> = {
  'fed-through-clock': ['silent', 'clock-shift', 'motor-clock'],
  'drive-fault': ['energized-without-flow', 'stopped', 'unexpected-run', ...NOT_RUNNING],
  freezing: ['energized-without-flow', 'stopped', ...NOT_RUNNING],
  'energized-without-flow': ['stopped', ...NOT_RUNNING],
  stopped: NOT_RUNNING,
  'unexpected-run': ['wrong-speed', 'low-load', 'high-load'],
  'failed-prime': [...NO_WATER, 'slow-prime'],
  'loss-of-prime': ['wrong-speed', 'low-load', 'high-load', 'too-little-water'],
  'missing-input': ['too-little-water'],
  'input-disagreement': ['wrong-speed', 'low-load', 'high-load'],
  'wrong-speed': ['low-load', 'high-load', 'too-little-water'],
  'low-load': ['too-little-water'],
  'high-load': ['too-little-water'],
};

/** A consequence that would speak first waits while its cause is still inside its own delay. */
export const WAITS_FOR: Readonly<Partial<Record<Detector, readonly Detector[]>>> = {
  stopped: ['freezing'],
};
