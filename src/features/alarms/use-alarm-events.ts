import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { alarmWords } from '#shared/domain/wording/alarm-words.ts';
import { useFormat } from '#src/hooks/use-format.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { alarmQueries } from './alarm-queries.ts';

export type AlarmEvent = { readonly at: number; readonly text: string };

/** One alarm as a homeowner's sentence, with its end where it has one. Notes are work of ours and stay out. */
export function describeForHome(alarm: Alarm, format: Format, now: number): AlarmEvent {
  const what = alarmWords(alarm.detector, alarm.cause, alarm.evidence).homeowner;
  const text =
    alarm.returnedAt === null
      ? what
      : t('home.lately.over', { what, time: format.moment(alarm.returnedAt, alarm.zone, now) });
  return { at: alarm.from, text };
}

/** What was wrong at a pump since an instant, in a homeowner's words. */
export function useAlarmEvents(pumpId: string, since: number, now: number): readonly AlarmEvent[] {
  const format = useFormat();
  const { data } = useQuery(alarmQueries.ofPump(pumpId));
  return useMemo(
    () =>
      (data?.items ?? [])
        .filter(({ from, alarmClass }) => alarmClass === 'alarm' && from >= since)
        .map((alarm) => describeForHome(alarm, format, now)),
    [data, since, format, now],
  );
}
