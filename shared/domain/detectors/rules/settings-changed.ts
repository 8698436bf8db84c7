import { defineDetector, type Finding } from '../define-detector.ts';
import type { Evidence } from '../detector.ts';
import type { Facts } from '../facts.ts';
import { ABNORMAL, type Judgement, NORMAL, UNJUDGED } from '../judgement.ts';

type State = Record<string, never>;

/** Only what the motor has reported is compared; commissioned data taken over on site ends it. */
function judge(_: State, { changedSettings, onSite }: Facts): Judgement {
  if (onSite) return UNJUDGED;
  return changedSettings.length > 0 ? ABNORMAL : NORMAL;
}

function describe(_: State, { reportedSettings, changedSettings: changed, context }: Facts): Finding {
  const evidence: { [key: string]: Evidence[string] } = { changes: changed.length, changed };
  for (const key of changed) {
    evidence[`${key}Reported`] = JSON.stringify(reportedSettings[key]);
    evidence[`${key}Commissioned`] = JSON.stringify(context.settings[key]);
  }
  return { cause: 'unknown', evidence };
}

export const settingsChanged = defineDetector<'settings-changed', State>({
  detector: 'settings-changed',
  hears: ['settings', 'on-site', 'time', 'reading'],
  clock: 'arrival',
  initial: () => ({}),
  judge,
  describe,
});
