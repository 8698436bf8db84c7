import { useInfiniteQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { Button } from '#src/components/ui/button.tsx';
import { Chip } from '#src/components/ui/chip.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { Select } from '#src/components/ui/select.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { changeSearch } from '#src/lib/read-search.ts';
import { ENERGY_USUAL, type EnergyView, PROGRAM_SHOWS, PROGRAM_SORTS } from './energy-address.ts';
import { energyQueries } from './energy-queries.ts';
import { ProgramCard } from './program-card.tsx';
import { nameOfMonthNumber } from './program-view.ts';

/** Programs and clock windows that cost too much, with what would do the same for less. */
export function ProgramList({ view }: { readonly view: EnergyView }) {
  const format = useFormat();
  const [, setSearch] = useSearchParams();
  const query = useInfiniteQuery(energyQueries.programs({ show: view.show, sort: view.order, q: view.q }));
  const { data, isError, error, refetch, hasNextPage, isFetchingNextPage, fetchNextPage } = query;
  const rows = data?.pages.flatMap(({ items }) => items);
  const first = data?.pages[0];
  const change = (next: Readonly<Record<string, string>>) =>
    setSearch((current) => changeSearch(current, next, ENERGY_USUAL), { preventScrollReset: true });
  return (
    <Sheet id="programs" title={t('program.title')}>
      <div data-print="never" className="flex flex-wrap items-center gap-1.5 border-b border-rule px-4 py-2 sm:px-5">
        <fieldset className="contents">
          <legend className="sr-only">{t('program.show')}</legend>
          {PROGRAM_SHOWS.map((show) => (
            <Chip key={show} on={view.show === show} onClick={() => change({ show })}>
              {t(`program.show.${show}`)}
            </Chip>
          ))}
        </fieldset>
        <Select
          quiet
          label={t('program.sort')}
          value={view.order}
          onChange={(order) => change({ order })}
          options={PROGRAM_SORTS.map((order) => ({ value: order, label: t(`program.sort.${order}`) }))}
        />
      </div>
      {rows === undefined ? (
        isError ? (
          <ErrorNotice error={error} onRetry={() => void refetch()} />
        ) : (
          <div aria-busy="true" className="ruled h-64" />
        )
      ) : rows.length === 0 ? (
        <NoProgram advised={first?.advised ?? 0} waiting={first?.waiting ?? 0} narrowed={view.q !== undefined} />
      ) : (
        <>
          <p className="px-4 pt-3 text-13 text-ink-2 sm:px-5">
            {t('program.caution', { month: nameOfMonthNumber(rows[0]?.month ?? 0, format.locale) })}
          </p>
          {rows.map((row) => (
            <ProgramCard key={row.pumpId} row={row} />
          ))}
        </>
      )}
      {first === undefined || first.waiting === 0 ? null : (
        <p className="border-t border-rule px-4 py-2 text-13 text-ink-2 sm:px-5">
          {t('program.waiting', { count: first.waiting })}
        </p>
      )}
      {hasNextPage ? (
        <p className="border-t border-rule px-4 py-3 sm:px-5">
          <Button disabled={isFetchingNextPage} onClick={() => void fetchNextPage()}>
            {isFetchingNextPage ? t('energy.pads.loading') : t('program.more')}
          </Button>
        </p>
      ) : null}
    </Sheet>
  );
}

type NoProgramProps = { readonly advised: number; readonly waiting: number; readonly narrowed: boolean };

function NoProgram({ advised, waiting, narrowed }: NoProgramProps) {
  if (narrowed) return <Notice title={t('program.noMatch')} />;
  return (
    <Notice title={advised === 0 && waiting > 0 ? t('program.none.waiting') : t('program.none')}>
      <p>{t('program.none.detail')}</p>
    </Notice>
  );
}
