import { useInfiniteQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { PAD_ENERGY_SORTS, type PadMonth } from '#shared/contract/http/energy-fleet.ts';
import { Button } from '#src/components/ui/button.tsx';
import { type Column, DataTable } from '#src/components/ui/data-table.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { ExportButton } from '#src/components/ui/export-button.tsx';
import { SearchField } from '#src/components/ui/search-field.tsx';
import { Select } from '#src/components/ui/select.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { paths } from '#src/lib/paths.ts';
import { changeSearch } from '#src/lib/read-search.ts';
import { ENERGY_USUAL, type EnergyView } from './energy-address.ts';
import { energyQueries } from './energy-queries.ts';
import { changeOf, changeText, kwhText, perVolumeHead, perVolumeText, shareText } from './energy-view.ts';
import { listEveryPad } from './list-every-pad.ts';
import type { MonthText } from './local-month.ts';

const twoDigits = (value: number | null, format: Format) => (value === null ? '–' : format.number(value, 2));

const savedText = ({ saved, savedKwh, currency }: PadMonth, format: Format) =>
  saved === null ? (savedKwh === null ? '–' : kwhText(savedKwh, format)) : format.money(saved, currency);

function listColumns(month: MonthText, growing: boolean, format: Format): Column<PadMonth>[] {
  const right = { figures: true, right: true };
  return [
    {
      head: t('energy.column.pad'),
      cell: ({ padId, padName }) => (
        <Link to={paths.padEnergy(padId, { month })} className="underline underline-offset-2 hover:bg-wash">
          {padName}
        </Link>
      ),
    },
    { head: t('energy.column.customer'), cell: ({ customerName }) => customerName ?? '–' },
    { head: t('energy.column.kwh'), ...right, cell: ({ kwh }) => kwhText(kwh, format) },
    {
      head: t('energy.column.change'),
      ...right,
      // Part of a month beside a whole one says nothing.
      cell: ({ kwh, previousKwh }) => (growing ? '–' : changeText(changeOf(kwh, previousKwh), format)),
    },
    { head: t('energy.column.cost'), ...right, cell: ({ cost, currency }) => format.money(cost, currency) },
    {
      head: perVolumeHead(format),
      ...right,
      cell: ({ kwhPerThousandGallons }) => perVolumeText(kwhPerThousandGallons, format),
    },
    {
      head: t('energy.column.perDay'),
      ...right,
      cell: ({ turnoversPerDay }) => twoDigits(turnoversPerDay, format),
    },
    {
      head: t('energy.column.wanted'),
      ...right,
      cell: ({ wantedTurnoversPerDay }) => twoDigits(wantedTurnoversPerDay, format),
    },
    { head: t('energy.column.saved'), ...right, cell: (pad) => savedText(pad, format) },
    { head: t('energy.column.coverage'), ...right, cell: ({ coverage }) => shareText(coverage, format) },
  ];
}

const exportRows = (pads: readonly PadMonth[]) => [
  [
    t('energy.column.pad'),
    t('energy.column.customer'),
    t('energy.column.pumps'),
    t('energy.column.kwh'),
    `${t('energy.column.change')}, kWh`,
    t('energy.column.cost'),
    'ISO 4217',
    `${t('energy.column.water')}, gal`,
    t('energy.column.perVolume'),
    t('energy.column.perDay'),
    t('energy.column.wanted'),
    `${t('energy.column.saved')}, kWh`,
    t('energy.column.saved'),
    `${t('energy.column.coverage')}, %`,
  ],
  ...pads.map((pad) => [
    pad.padName,
    pad.customerName,
    pad.pumps,
    pad.kwh,
    pad.previousKwh,
    pad.cost,
    pad.currency,
    pad.gallons,
    pad.kwhPerThousandGallons,
    pad.turnoversPerDay,
    pad.wantedTurnoversPerDay,
    pad.savedKwh,
    pad.saved,
    pad.coverage * 100,
  ]),
];

export type PadsSheetProps = {
  readonly month: MonthText;
  /** The month goes on. */
  readonly growing: boolean;
  readonly view: EnergyView;
};

/** Every pad's month, worst first in the sense one asks for; each leads to its own page. */
export function PadsSheet({ month, growing, view }: PadsSheetProps) {
  const format = useFormat();
  const [, setSearch] = useSearchParams();
  const filter = { sort: view.sort, q: view.q };
  const query = useInfiniteQuery(energyQueries.pads(month, filter));
  const { data, isError, error, refetch, hasNextPage, isFetchingNextPage, fetchNextPage, isPlaceholderData } = query;
  const pads = data?.pages.flatMap(({ items }) => items);
  const matching = data?.pages[0]?.matching ?? 0;
  const change = (next: Readonly<Record<string, string>>, replace = false) =>
    setSearch((current) => changeSearch(current, next, ENERGY_USUAL), { replace, preventScrollReset: true });
  return (
    <Sheet
      id="pads"
      title={t('energy.pads')}
      aside={
        <ExportButton name={`energy-${month}-pads`} rows={async () => exportRows(await listEveryPad(month, filter))} />
      }
    >
      <search data-print="never" className="flex flex-wrap items-center gap-2 border-b border-rule px-4 py-2 sm:px-5">
        <SearchField value={view.q ?? ''} onSearch={(q) => change({ q }, true)} />
        <Select
          quiet
          label={t('energy.pads.sort')}
          value={view.sort}
          onChange={(sort) => change({ sort })}
          options={PAD_ENERGY_SORTS.map((sort) => ({ value: sort, label: t(`energy.pads.sort.${sort}`) }))}
        />
        <span role="status" className="text-13 text-ink-2">
          {pads === undefined ? '' : t('energy.pads.matching', { count: matching })}
        </span>
      </search>
      <div aria-busy={isPlaceholderData} className="px-4 py-3 sm:px-5">
        {pads === undefined ? (
          isError ? (
            <ErrorNotice error={error} onRetry={() => void refetch()} />
          ) : (
            <div aria-busy="true" className="ruled h-64" />
          )
        ) : pads.length === 0 ? (
          <p className="text-ink-2">{view.q === undefined ? t('energy.pads.none') : t('energy.pads.noMatch')}</p>
        ) : (
          <DataTable
            wide="very"
            caption={t('energy.pads')}
            rows={pads}
            keyOf={({ padId }) => padId}
            columns={listColumns(month, growing, format)}
          />
        )}
        {hasNextPage ? (
          <p className="pt-3">
            <Button disabled={isFetchingNextPage} onClick={() => void fetchNextPage()}>
              {isFetchingNextPage ? t('energy.pads.loading') : t('energy.pads.more')}
            </Button>
          </p>
        ) : null}
      </div>
    </Sheet>
  );
}
