import type { Detector } from '../detectors/detector.ts';
import type { CauseSlug } from './cause-words.data.ts';

/** What a detector calls a cause, where the table of causes has another name for what lies behind it. */
export const CAUSES_SAID: Readonly<Partial<Record<Detector, Readonly<Record<string, CauseSlug>>>>> = {
  'wrong-speed': {
    'follows-lower-input': 'input-wiring',
    'ignores-input': 'input-wiring',
    'runs-input-open': 'input-wiring',
    'unknown-speed': 'settings-changed',
  },
};
