import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { parseEnergyAddress } from '#src/features/energy/energy-address.ts';
import { energyQueries } from '#src/features/energy/energy-queries.ts';
import { FleetDays } from '#src/features/energy/fleet-days.tsx';
import { FleetSummary, fleetHeading, listFleetNotes } from '#src/features/energy/fleet-summary.tsx';
import { HourSheet } from '#src/features/energy/hour-sheet.tsx';
import { dayAt, earlierOf, type MonthText, monthAt, usualMonth } from '#src/features/energy/local-month.ts';
import { MonthNav } from '#src/features/energy/month-nav.tsx';
import { PadsSheet } from '#src/features/energy/pads-sheet.tsx';
import { PeriodTable } from '#src/features/energy/period-table.tsx';
import { ProgramList } from '#src/features/energy/program-list.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { useNow } from '#src/hooks/use-now.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/energy-words.ts';

/** A month of the whole fleet: what it used, when, what that cost, what was saved, and what costs more than it must. */
export function EnergyPage() {
  const format = useFormat();
  const { company } = useSession();
  const [search] = useSearchParams();
  const now = useNow(60_000);
  const view = useMemo(() => parseEnergyAddress(search), [search]);
  const present = monthAt(company.zone, now);
  const [first, setFirst] = useState<MonthText>();
  const usual = usualMonth(dayAt(company.zone, now), first);
  const month = earlierOf(view.month ?? usual, present);
  const growing = month === present;
  const { data, isError, error, refetch, isPlaceholderData } = useQuery(energyQueries.fleet(month, growing));
  // Which month is usual depends on the first there is anything of, and any month's answer names that.
  const known = data === undefined ? undefined : (data.firstMonth ?? present);
  if (known !== undefined && known !== first) setFirst(known);
  const hours = useQuery(energyQueries.fleetHours(month, growing));
  return (
    <div className="mx-auto flex max-w-[90rem] flex-col gap-4 px-4 py-5 sm:px-7">
      <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-2">
        <PageHeading title={t('energy.page')}>
          {data === undefined ? t('energy.page') : <Figures text={fleetHeading(data, present, format)} />}
        </PageHeading>
        <MonthNav month={month} present={present} usual={usual} first={data?.firstMonth ?? undefined} />
      </div>
      {data === undefined ? (
        isError ? (
          <div className="border border-ink bg-sheet">
            <ErrorNotice error={error} onRetry={() => void refetch()} />
          </div>
        ) : (
          <div aria-busy="true" className="ruled h-64 border border-ink bg-sheet" />
        )
      ) : (
        <div aria-busy={isPlaceholderData} className="flex flex-col gap-4">
          <p className="text-ink-2">
            <Figures text={listFleetNotes(data, present, company.zone, format).join(' ')} />
          </p>
          {data.coveredSeconds === 0 ? null : (
            <>
              <FleetSummary energy={data} />
              <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-4 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
                <FleetDays days={data.days} month={month} />
                <PeriodTable periods={data.periods} currency={data.currency} file={`energy-${month}-periods`} />
              </div>
            </>
          )}
        </div>
      )}
      <HourSheet
        data={hours.data}
        error={hours.error}
        onRetry={() => void hours.refetch()}
        month={month}
        file={`energy-${month}-hours`}
      />
      <PadsSheet month={month} growing={growing} view={view} />
      <ProgramList view={view} />
    </div>
  );
}
