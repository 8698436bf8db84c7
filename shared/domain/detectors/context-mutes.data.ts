import type { PadState } from '../control/pump-context.ts';
import { CAUSE_CHAIN } from './cause-chain.data.ts';
import type { Detector } from './detector.ts';

/** What may hurt someone or burst a pipe: heard whoever is on site and whatever is being worked on. */
export const HAZARDS: readonly Detector[] = ['freezing', 'energized-without-flow'];

const allBut = (...heard: readonly Detector[]): readonly Detector[] =>
  CAUSE_CHAIN.filter((detector) => !heard.includes(detector));

/** On-site mode, a call or a start-up in progress: quiet but for the hazards. */
export const ON_SITE_MUTES: readonly Detector[] = allBut(...HAZARDS);

/**
 * What stays quiet in each state of a pad. A winterized or drained pad expects nothing, so that only a pump that runs
 * there is news; new plaster runs day and night on purpose; a pad under repair or on hold keeps its hazards; a vacant
 * house has nobody to notice, so nothing is muted.
 */
export const PAD_STATE_MUTES: Readonly<Record<PadState, readonly Detector[]>> = {
  open: [],
  vacant: [],
  reduced: ['too-little-water', 'costly-program'],
  winterized: allBut('unexpected-run', 'drive-fault'),
  drained: allBut('unexpected-run', 'drive-fault', 'freezing'),
  opening: ON_SITE_MUTES,
  repair: ON_SITE_MUTES,
  hold: ON_SITE_MUTES,
  'new-plaster': [
    'unexpected-run',
    'wrong-speed',
    'keypad-hold',
    'stuck-input',
    'missing-input',
    'clock-shift',
    'settings-changed',
    'too-little-water',
    'costly-program',
  ],
};
