import { useCallback, useMemo } from 'react';
import type { HourMap as HourMapData } from '#shared/contract/http/energy.ts';
import { HourMap } from '#src/components/charts/hour-map/hour-map.tsx';
import { HOURS, type HourPlace, rankPrices } from '#src/components/charts/hour-map/hour-map-view.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { ExportButton } from '#src/components/ui/export-button.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { TableToggle } from '#src/components/ui/table-toggle.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { kwhText } from './energy-view.ts';
import { type MonthText, nameOfMonth } from './local-month.ts';

export type HourSheetProps = {
  readonly data: HourMapData | undefined;
  readonly error: unknown;
  readonly onRetry: () => void;
  readonly month: MonthText;
  readonly file: string;
};

const dayInstant = (day: string) => Date.parse(`${day}T00:00:00Z`);
const HOUR_LIST = Array.from({ length: HOURS }, (_, hour) => hour);

/** The month hour by hour: when it runs, and whether that is when it is dear. */
export function HourSheet({ data, error, onRetry, month, file }: HourSheetProps) {
  if (data === undefined) {
    return (
      <Sheet id="hours" title={t('energy.hours')}>
        {error === null || error === undefined ? (
          <div aria-busy="true" className="ruled h-64" />
        ) : (
          <ErrorNotice error={error} onRetry={onRetry} />
        )}
      </Sheet>
    );
  }
  const known = data.days.some(({ wattHours }) => wattHours.some((value) => value !== null));
  return (
    <Sheet id="hours" title={t('energy.hours')}>
      {known ? (
        <Hours data={data} month={month} file={file} />
      ) : (
        <p className="px-4 py-3 text-ink-2 sm:px-5">{t('energy.hours.none')}</p>
      )}
    </Sheet>
  );
}

function Hours({ data, month, file }: { readonly data: HourMapData } & Pick<HourSheetProps, 'month' | 'file'>) {
  const format = useFormat();
  const { days, prices } = data;
  const hourLabel = useCallback((hour: number) => format.minuteOfDay(hour * 60), [format]);
  const rows = useMemo(
    () => days.map(({ day, wattHours }) => ({ label: format.dayOfMonth(dayInstant(day), 'UTC'), values: wattHours })),
    [days, format],
  );
  const priceRows = useMemo(() => {
    if (prices === null) return [];
    const all = [...prices.weekday, ...prices.weekend];
    return [
      { label: t('energy.hours.weekday'), ranks: rankPrices(prices.weekday, all) },
      { label: t('energy.hours.weekend'), ranks: rankPrices(prices.weekend, all) },
    ];
  }, [prices]);
  const describe = ({ kind, index, hour }: HourPlace) => {
    const time = `${hourLabel(hour)}–${hourLabel(hour + 1)}`;
    if (kind === 'price') {
      const price = index === 0 ? prices?.weekday[hour] : prices?.weekend[hour];
      const which = index === 0 ? t('energy.hours.weekdayLong') : t('energy.hours.weekendLong');
      return t('energy.hours.price', { days: which, time, price: format.price(price, prices?.currency ?? null) });
    }
    const cells = days[index];
    if (cells === undefined) return '';
    const value = cells.wattHours[hour];
    const day = format.day(dayInstant(cells.day), 'UTC');
    return value === null || value === undefined
      ? t('energy.hours.cellNone', { day, time })
      : t('energy.hours.cell', { day, time, kwh: kwhText(value / 1000, format) });
  };
  return (
    <div className="flex flex-col gap-1 px-4 py-3 sm:px-5">
      <HourMap
        rows={rows}
        prices={priceRows}
        hourLabel={hourLabel}
        name={t('energy.hours.name', { month: nameOfMonth(month, format.locale) })}
        describe={describe}
        idle={prices === null ? t('energy.hours.plain') : t('energy.hours.detail')}
      />
      <TableToggle label={t('energy.hours.table')}>
        <div className="flex flex-col gap-2">
          <DataTable
            wide="very"
            caption={t('energy.hours.table')}
            rows={days}
            keyOf={({ day }) => day}
            columns={[
              {
                head: t('energy.column.day'),
                figures: true,
                cell: ({ day }: HourMapData['days'][number]) => format.dayOfMonth(dayInstant(day), 'UTC'),
              },
              ...HOUR_LIST.map((hour) => ({
                head: hourLabel(hour),
                figures: true,
                right: true,
                cell: ({ wattHours }: HourMapData['days'][number]) => {
                  const value = wattHours[hour];
                  return value === null || value === undefined ? '–' : format.number(value / 1000, 2);
                },
              })),
            ]}
          />
          <ExportButton
            name={file}
            rows={() => [
              [t('energy.column.day'), ...HOUR_LIST.map((hour) => `${hour}:00, kWh`)],
              ...days.map(({ day, wattHours }) => [
                day,
                ...wattHours.map((value) => (value === null ? null : value / 1000)),
              ]),
            ]}
          />
        </div>
      </TableToggle>
    </div>
  );
}
