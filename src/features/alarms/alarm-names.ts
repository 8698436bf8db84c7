import type { Alarm } from '#shared/contract/http/alarms.ts';
import { alarmTitle } from '#shared/domain/wording/alarm-title.ts';
import { t } from '#src/lib/messages/t.ts';

/** What is wrong, in a few words. */
export const titleOf = ({ detector, cause, evidence }: Pick<Alarm, 'detector' | 'cause' | 'evidence'>): string =>
  alarmTitle(detector, cause, evidence);

/** Where, as people say it. */
export const whereOf = ({ padName, pumpName }: Pick<Alarm, 'padName' | 'pumpName'>): string =>
  pumpName === '' ? padName : t('alarm.where', { pad: padName, pump: pumpName });
