import { Link } from 'react-router-dom';
import type { NamedAlarm } from '#shared/contract/http/alarm-health.ts';
import { alarmTitle } from '#shared/domain/wording/alarm-title.ts';
import { t } from '#src/lib/messages/health-words.ts';
import { paths } from '#src/lib/paths.ts';

export const nameOfAlarm = ({ detector, cause, evidence }: NamedAlarm): string => alarmTitle(detector, cause, evidence);

export const nameOfPump = ({ padName, pumpName }: NamedAlarm): string =>
  padName === null
    ? t('health.offenders.several')
    : pumpName === null || pumpName === ''
      ? padName
      : t('alarm.where', { pad: padName, pump: pumpName });

const LINK = 'underline underline-offset-2 hover:bg-wash';

/** What it was: the newest alarm of its kind. */
export const AlarmLink = ({ alarm }: { readonly alarm: NamedAlarm }) => (
  <Link to={paths.alarm(alarm.alarmId)} className={LINK}>
    {nameOfAlarm(alarm)}
  </Link>
);

/** Where it was; an alarm for several pumps has no page of one. */
export const PumpLink = ({ alarm }: { readonly alarm: NamedAlarm }) =>
  alarm.pumpId === null ? (
    nameOfPump(alarm)
  ) : (
    <Link to={paths.pump(alarm.pumpId)} className={LINK}>
      {nameOfPump(alarm)}
    </Link>
  );
