import type { PumpRow } from '#shared/contract/http/pumps.ts';
import { zoneOffsetAt } from '#shared/domain/time/zone-offset.ts';
import { alarmTitle } from '#shared/domain/wording/alarm-title.ts';
import type { MarkKind } from '#src/components/ui/priority-mark.tsx';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/t.ts';
import { whyNowShort } from '#src/lib/why/why.ts';

/** The pen mark of a row, and the words beside it: what is wrong, or else why the pump runs as it does. */
export type RowView = {
  readonly mark: MarkKind | undefined;
  readonly acknowledged: boolean;
  readonly line: string;
  readonly rpm: string;
  readonly watts: string;
};

const NO_FIGURE = '–';

function describeAlarm({ detector, cause, evidence, open }: NonNullable<PumpRow['alarm']>): string {
  const title = alarmTitle(detector, cause, evidence);
  return open > 1 ? t('fleet.moreAlarms', { title, count: open - 1 }) : title;
}

function describeCalm(row: PumpRow, format: Format, now: number): string {
  if (row.serial === null) return t('fleet.noDevice');
  if (row.silentSince !== null) return t('fleet.silentSince', { time: format.moment(row.silentSince, row.zone, now) });
  return row.now === null ? t('fleet.neverHeard') : whyNowShort(row.now, row, format);
}

/** Pad state where it is not the usual one, then the line. */
const withPadState = ({ padState }: PumpRow, line: string): string =>
  padState === 'open' ? line : `${t(`padState.${padState}`)} · ${line}`;

export function viewRow(row: PumpRow, format: Format, now: number): RowView {
  const { alarm, silentSince } = row;
  const heard = silentSince === null ? row.now : null;
  return {
    mark: alarm?.priority ?? (silentSince === null ? undefined : 'silent'),
    acknowledged: alarm?.acknowledged ?? true,
    line: withPadState(row, alarm === null ? describeCalm(row, format, now) : describeAlarm(alarm)),
    rpm: heard === null ? NO_FIGURE : format.number(heard.rpm),
    watts: heard === null ? NO_FIGURE : format.number(heard.watts),
  };
}

/** The wall's axis is in the company's zone: a pad whose clocks show another time says which. */
export const isElsewhere = (row: Pick<PumpRow, 'zone'>, companyZone: string, now: number): boolean =>
  row.zone !== companyZone && zoneOffsetAt(row.zone, now) !== zoneOffsetAt(companyZone, now);
