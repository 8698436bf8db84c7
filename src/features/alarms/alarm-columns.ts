import type { Alarm } from '#shared/contract/http/alarms.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { titleOf } from './alarm-names.ts';
import { dayOfStop, describeState } from './alarm-view.ts';

type Told = { readonly format: Format; readonly now: number };

/** One column of the table and of the file: its head, and what it says of an alarm. */
export type AlarmColumn = {
  readonly head: string;
  readonly figures?: boolean;
  readonly value: (alarm: Alarm, told: Told) => string | number | null;
  /** How the page writes it, where a person reads it otherwise than a spreadsheet. */
  readonly shown?: (alarm: Alarm, told: Told) => string | null;
};

/** The same columns on the page and in the file, so that neither knows more than the other. */
export const listAlarmColumns = (): readonly AlarmColumn[] => [
  { head: t('alarms.column.priority'), value: ({ priority }) => t(`alarms.priority.${priority}`) },
  { head: t('alarms.column.what'), value: titleOf },
  { head: t('alarms.column.pad'), value: ({ padName }) => padName },
  { head: t('alarms.column.pump'), value: ({ pumpName }) => pumpName },
  { head: t('alarms.column.customer'), value: ({ customerName }) => customerName },
  { head: t('alarms.column.area'), value: ({ area }) => area },
  {
    head: t('alarms.column.since'),
    figures: true,
    value: ({ from, zone }, told) => whenAt(from, zone, told),
    shown: ({ from, zone }, { format, now }) => format.moment(from, zone, now),
  },
  {
    head: t('alarms.column.until'),
    figures: true,
    value: ({ returnedAt, zone }, told) => (returnedAt === null ? null : whenAt(returnedAt, zone, told)),
    shown: ({ returnedAt, zone }, { format, now }) =>
      returnedAt === null ? null : format.moment(returnedAt, zone, now),
  },
  { head: t('alarms.column.count'), figures: true, value: ({ count }) => count },
  { head: t('alarms.column.state'), value: (alarm, { format, now }) => describeState(alarm, format, now) },
  { head: t('alarms.column.technician'), value: ({ technicianName }) => technicianName },
  {
    head: t('alarms.column.nextStop'),
    figures: true,
    value: ({ nextStopOn }) => nextStopOn,
    shown: ({ nextStopOn, zone }, { format }) => (nextStopOn === null ? null : dayOfStop(nextStopOn, zone, format)),
  },
  { head: t('alarms.column.found'), value: ({ done }) => done?.found ?? null },
];

/** Always with its day: a file is read on another one. */
const whenAt = (at: number, zone: string, { format }: Told): string =>
  `${format.dayWithYear(at, zone)}, ${format.time(at, zone)}`;
