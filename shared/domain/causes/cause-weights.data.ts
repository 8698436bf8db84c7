import type { Detector } from '../detectors/detector.ts';
import type { CauseSlug } from './cause-words.data.ts';
import type { CauseWeight } from './likely-cause.ts';

const weigh = (cause: CauseSlug, guess: number, signs: CauseWeight['signs'] = {}): CauseWeight => ({
  cause,
  guess,
  signs,
});

const AIR_LEAK = {
  'lid-opened': [4, 0.7],
  'air-from-the-start': [3, 0.6],
  'our-visit': [1.5, 1],
  frost: [1.5, 1],
} as const;
const WATER_LOW = {
  'load-comes-and-goes': [4, 0.7],
  'water-low-reported': [8, 0.5],
  heat: [1.5, 1],
  'heavy-rain': [0.5, 1],
} as const;
const BLOCKED = { 'some-load': [3, 0.7], wind: [2, 1], 'neighbours-too': [3, 1], 'psi-low': [2, 1] } as const;
const VALVE_SHUT = { 'load-of-a-shut-valve': [5, 0.4], 'our-visit': [2, 0.8], 'psi-high': [1.5, 1] } as const;
const DRAINED_BACK = { 'slower-each-start': [4, 0.5], 'lid-opened': [0.8, 1] } as const;

/**
 * What lies behind each alarm, with starting guesses and how far each sign moves them. Common practice in the trade;
 * the company's own closed calls outweigh the guesses as they come in.
 */
export const CAUSE_WEIGHTS: Readonly<Record<Detector, readonly CauseWeight[]>> = {
  'wrong-speed': [
    weigh('settings-changed', 4, { 'our-visit': [2, 0.9], 'new-boot': [1.5, 1] }),
    weigh('input-wiring', 2, { 'our-visit': [1.5, 1], 'all-inputs': [2, 0.8], 'heavy-rain': [2, 1] }),
    weigh('derating', 2, { 'drive-hot': [6, 0.3], heat: [2, 0.8] }),
    weigh('power-limit', 1, { 'low-voltage': [3, 0.8], 'far-over-usual': [2, 1] }),
    weigh('left-on-manual', 1, { 'our-visit': [2, 0.9] }),
  ],
  'input-disagreement': [
    weigh('swapped-leads', 6, { 'our-visit': [3, 0.8] }),
    weigh('loose-common', 2, { 'all-inputs': [3, 0.8], 'heavy-rain': [2, 1] }),
    weigh('device-miswired', 2, { 'our-visit': [2, 0.8] }),
  ],
  'missing-input': [
    weigh('clock-stopped', 4, { 'power-cut': [3, 0.8], 'all-inputs': [0.7, 1] }),
    weigh('tripper-loose', 2, { 'our-visit': [1.5, 1], 'all-inputs': [0.3, 1] }),
    weigh('switch-worn', 2, { 'all-inputs': [0.3, 1] }),
    weigh('breaker-off', 1, { 'all-inputs': [6, 0.6], 'power-cut': [2, 1], 'our-visit': [2, 1] }),
    weigh('wire-broken', 1, { 'all-inputs': [3, 0.8], 'heavy-rain': [1.5, 1] }),
  ],
  'stuck-input': [
    weigh('tripper-missing', 4, { 'our-visit': [1.5, 1], 'all-inputs': [0.4, 1] }),
    weigh('lever-left-on', 3, { 'our-visit': [1.5, 1], slow: [0.5, 1] }),
    weigh('switch-welded', 2, { slow: [2, 1] }),
    weigh('clock-stopped', 1, { 'power-cut': [3, 0.8], 'all-inputs': [3, 0.8] }),
  ],
  'chattering-input': [
    weigh('loose-wire', 5, { 'our-visit': [2, 0.9], 'heavy-rain': [1.5, 1], 'all-inputs': [2, 0.8] }),
    weigh('switch-failing', 4, { slow: [2, 1], 'all-inputs': [0.4, 1] }),
    weigh('damp-junction', 1, { 'heavy-rain': [5, 0.6] }),
  ],
  'failed-prime': [
    weigh('air-leak', 4, AIR_LEAK),
    weigh('water-low', 2, WATER_LOW),
    weigh('blocked', 2, BLOCKED),
    weigh('valve-shut', 1, VALVE_SHUT),
    weigh('drained-back', 1, DRAINED_BACK),
  ],
  'slow-prime': [
    weigh('air-leak', 4, AIR_LEAK),
    weigh('drained-back', 3, DRAINED_BACK),
    weigh('blocked', 2, BLOCKED),
    weigh('water-low', 1, WATER_LOW),
  ],
  'loss-of-prime': [
    weigh('water-low', 4, { ...WATER_LOW, 'ragged-load': [2, 0.8] }),
    weigh('air-leak', 3, { ...AIR_LEAK, 'ragged-load': [1.5, 1] }),
    weigh('blocked', 2, { ...BLOCKED, sudden: [1.5, 1] }),
    weigh('valve-shut', 1, { ...VALVE_SHUT, sudden: [2, 0.7] }),
  ],
  'low-load': [
    weigh('plugged-basket', 4, {
      sudden: [3, 0.6],
      slow: [0.6, 1],
      wind: [3, 1],
      'neighbours-too': [3, 1],
      'psi-low': [3, 1],
      'psi-high': [0.3, 1],
      'lid-opened': [0.7, 1],
    }),
    weigh('dirty-filter', 3, {
      slow: [4, 0.5],
      sudden: [0.4, 1],
      'psi-high': [5, 0.6],
      'psi-low': [0.2, 1],
      'filter-cleaned': [0.1, 1.2],
    }),
    weigh('valve-shut', 2, {
      sudden: [2, 0.7],
      slow: [0.3, 1],
      'our-visit': [2, 0.9],
      'load-of-a-shut-valve': [4, 0.8],
    }),
    weigh('clogged-impeller', 1, { 'psi-low': [2, 1], 'psi-high': [0.3, 1], wind: [1.5, 1], slow: [1.5, 1] }),
  ],
  'high-load': [
    weigh('bypass', 3, { 'our-visit': [2, 0.9], sudden: [1.5, 1], 'psi-low': [2, 1] }),
    weigh('to-waste', 3, { 'far-over-usual': [4, 0.5], 'heavy-rain': [3, 1], sudden: [1.5, 1] }),
    weigh('rubbing', 2, { slow: [2, 0.8], 'lid-opened': [1.5, 1], 'far-over-usual': [0.6, 1] }),
    weigh('failing-bearing', 1, { slow: [3, 0.6], 'drive-hot': [1.5, 1] }),
    weigh('filter-cleaned', 1, { 'filter-cleaned': [6, 0.5], 'psi-low': [1.5, 1] }),
  ],
  stopped: [
    weigh('keypad-stop', 4, { 'our-visit': [2, 0.9], 'fault-code': [0.3, 1], 'new-boot': [0.6, 1] }),
    weigh('fault', 3, { 'fault-code': [6, 0.4], 'drive-hot': [2, 1], 'low-voltage': [1.5, 1] }),
    weigh('supply-lost', 2, { 'new-boot': [3, 0.7], 'power-cut': [3, 0.8], 'neighbours-too': [2, 1] }),
    weigh('failed-motor', 1, { 'fault-code': [1.5, 1] }),
  ],
  'unexpected-run': [
    weigh('program-changed', 4, { 'our-visit': [1.5, 1], 'new-boot': [1.2, 1] }),
    weigh('motor-clock', 4, { 'power-cut': [3, 0.8], 'clocks-shifted': [4, 0.8], 'new-boot': [2, 1] }),
    weigh('input-closed-unseen', 2, { 'all-inputs': [1.5, 1], 'heavy-rain': [1.5, 1] }),
  ],
  'clock-shift': [
    weigh('power-cut', 4, { 'power-cut': [6, 0.3], 'neighbours-too': [2, 1], 'new-boot': [2, 0.8] }),
    weigh('daylight-saving', 3, { 'clocks-shifted': [8, 0.1], 'neighbours-too': [1.5, 1] }),
    weigh('trippers-moved', 2, { 'our-visit': [2, 0.9], sudden: [1.5, 1] }),
    weigh('drift', 1, { slow: [5, 0.5], sudden: [0.3, 1] }),
  ],
  'motor-clock': [
    weigh('power-cut', 4, { 'power-cut': [5, 0.4], 'new-boot': [2, 0.7] }),
    weigh('daylight-saving', 4, { 'clocks-shifted': [8, 0.1] }),
    weigh('drift', 2, { slow: [5, 0.5], sudden: [0.3, 1] }),
  ],
  'fed-through-clock': [
    weigh('motor-on-clock-circuit', 8, { 'same-time-each-day': [3, 0.3], 'our-visit': [1.2, 1] }),
    weigh('breaker-switched-daily', 1, { 'same-time-each-day': [0.6, 1] }),
    weigh('device-on-clock-circuit', 1, { 'our-visit': [1.5, 1] }),
  ],
  'keypad-hold': [
    weigh('left-on-manual-by-us', 5, { 'our-visit': [4, 0.3] }),
    weigh('left-on-manual-by-homeowner', 5, { 'our-visit': [0.5, 1.3] }),
  ],
  'settings-changed': [
    weigh('changed-by-homeowner', 4, { 'our-visit': [0.6, 1.2] }),
    weigh('changed-by-us-not-recorded', 3, { 'our-visit': [4, 0.4] }),
    weigh('changed-by-another-trade', 2),
    weigh('back-to-factory-settings', 1, { 'new-boot': [3, 0.7], 'fault-code': [2, 1] }),
  ],
  'energized-without-flow': [
    weigh('failed-prime', 4, { standing: [0.1, 4], 'air-from-the-start': [3, 1], 'lid-opened': [2, 1] }),
    weigh('keypad-stop', 3, { standing: [2, 0.1], 'our-visit': [2, 0.9], 'fault-code': [0.4, 1] }),
    weigh('fault', 2, { standing: [2, 0.1], 'fault-code': [6, 0.5] }),
    weigh('no-flow-interlock', 1),
  ],
  'too-little-water': [
    weigh('short-hours', 5, {
      'flow-too-low': [0.2, 2],
      slow: [0.7, 1],
      'clocks-shifted': [1.2, 1],
      'power-cut': [1.5, 1],
    }),
    weigh('dirty-filter', 3, {
      'flow-too-low': [3, 0.4],
      slow: [3, 0.8],
      'psi-high': [4, 0.7],
      'filter-cleaned': [0.3, 1.2],
    }),
    weigh('slow-program', 2, { 'flow-too-low': [3, 0.4], 'our-visit': [1.5, 1] }),
  ],
  freezing: [
    weigh('stopped-by-hand', 4, { 'our-visit': [1.5, 1], 'fault-code': [0.4, 1] }),
    weigh('protection-off', 3, { 'new-boot': [1.5, 1] }),
    weigh('fault', 2, { 'fault-code': [6, 0.5] }),
    weigh('should-be-winterized', 1),
  ],
  'supply-voltage': [
    weigh('utility', 4, { 'high-voltage': [3, 1], 'neighbours-too': [6, 0.5], 'power-cut': [2, 1], heat: [1.5, 1] }),
    weigh('bad-connection', 3, {
      'high-voltage': [0.3, 1],
      'neighbours-too': [0.3, 1.2],
      slow: [2, 1],
      sudden: [1.2, 1],
    }),
    weigh('wire-too-thin', 2, { 'high-voltage': [0.1, 1], 'neighbours-too': [0.3, 1], 'our-visit': [1.2, 1] }),
    weigh('wrong-nominal', 1, { 'high-voltage': [1.5, 1], 'our-visit': [2, 0.9] }),
  ],
  'drive-fault': [
    weigh('supply', 3, { 'low-voltage': [4, 0.7], 'power-cut': [3, 0.9], 'neighbours-too': [2, 1] }),
    weigh('overheated', 3, { 'drive-hot': [5, 0.4], heat: [2, 0.9] }),
    weigh('overload', 2, { 'far-over-usual': [3, 0.9], 'some-load': [1.2, 1] }),
    weigh('failed-drive', 2, { 'new-boot': [1.5, 1], 'heavy-rain': [1.5, 1] }),
  ],
  'drive-hot': [
    weigh('vents-blocked', 4, { slow: [2, 1], wind: [1.5, 1] }),
    weigh('sun-and-heat', 4, { heat: [4, 0.4], 'at-night-only': [0.1, 1], 'neighbours-too': [2, 1] }),
    weigh('overload', 1, { 'far-over-usual': [4, 0.8] }),
    weigh('failed-fan', 1, { 'at-night-only': [2, 1], sudden: [2, 1] }),
  ],
  silent: [
    weigh('link', 5, { 'neighbours-too': [0.4, 1], 'new-boot': [0.8, 1] }),
    weigh('power', 3, { 'neighbours-too': [6, 0.6], 'power-cut': [5, 0.8], 'same-time-each-day': [2, 1] }),
    weigh('device', 2, { 'heavy-rain': [1.5, 1], 'our-visit': [1.5, 1] }),
  ],
  'clock-skew': [
    weigh('no-time-server', 7, { 'new-boot': [2, 0.9], 'neighbours-too': [1.2, 1] }),
    weigh('device-clock-failing', 3, { slow: [2, 1] }),
  ],
  'costly-program': [
    weigh('speed-too-high', 4),
    weigh('dear-hours', 3, { 'clocks-shifted': [1.5, 1], 'power-cut': [1.2, 1] }),
    weigh('hours-too-long', 3),
  ],
};
