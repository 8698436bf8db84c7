import { useQuery } from '@tanstack/react-query';
import { Link, useParams, useSearchParams } from 'react-router-dom';
import type { PadEnergy } from '#shared/contract/http/energy.ts';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { AnswerNotes } from '#src/features/energy/answer-notes.tsx';
import { energyQueries } from '#src/features/energy/energy-queries.ts';
import { kwhText } from '#src/features/energy/energy-view.ts';
import { FigureRow } from '#src/features/energy/figure-row.tsx';
import { HourSheet } from '#src/features/energy/hour-sheet.tsx';
import {
  dayAfter,
  dayAt,
  daysOfMonth,
  earlierOf,
  monthAt,
  nameOfMonth,
  parseMonth,
} from '#src/features/energy/local-month.ts';
import { MonthNav } from '#src/features/energy/month-nav.tsx';
import { PadPumps } from '#src/features/energy/pad-pumps.tsx';
import { PeriodTable } from '#src/features/energy/period-table.tsx';
import { SavedSheet } from '#src/features/energy/saved-sheet.tsx';
import { SpanBars } from '#src/features/energy/span-bars.tsx';
import { WaterBars } from '#src/features/energy/water-bars.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { useNow } from '#src/hooks/use-now.ts';
import { useSession } from '#src/hooks/use-session.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { paths } from '#src/lib/paths.ts';

function headingOf(
  { padName, totals, currency }: PadEnergy,
  { month, soFar }: { readonly month: string; readonly soFar: boolean },
  format: Format,
): string {
  const values = { month, kwh: kwhText(totals.kwh, format) };
  if (totals.coveredSeconds === 0) return `${padName}: ${t('energy.heading.none', { month })}`;
  if (totals.cost === null)
    return `${padName}: ${soFar ? t('energy.heading.sofarKwh', values) : t('energy.heading.pastKwh', values)}`;
  const priced = { ...values, cost: format.money(totals.cost, currency) };
  return `${padName}: ${soFar ? t('energy.heading.sofar', priced) : t('energy.heading.past', priced)}`;
}

/** A month of one pad: all its pumps together, and each. */
export function PadEnergyPage() {
  const { padId = '' } = useParams();
  const format = useFormat();
  const { company } = useSession();
  const [search] = useSearchParams();
  const now = useNow(60_000);
  // The answer names the pad's own zone; until it is there the company's tells the month.
  const present = monthAt(company.zone, now);
  const asked = parseMonth(search.get('month')) ?? present;
  const month = earlierOf(asked, present);
  const growing = month === present;
  const today = dayAt(company.zone, now);
  const days = daysOfMonth(month, today) ?? { from: today, until: dayAfter(today) };
  const { data, isError, error, refetch, isPlaceholderData } = useQuery(
    energyQueries.pad(padId, { ...days, by: 'day', growing }),
  );
  const hours = useQuery({ ...energyQueries.padHours(padId, month, growing), enabled: data !== undefined });
  const name = nameOfMonth(month, format.locale);
  return (
    <div className="mx-auto flex max-w-[90rem] flex-col gap-4 px-4 py-5 sm:px-7">
      <div>
        <Link to={paths.energy({ month })} data-print="never" className="text-ink-2 underline underline-offset-2">
          {t('energy.pads.back')}
        </Link>
        <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-2">
          <PageHeading title={data === undefined ? t('energy.page') : t('energy.pad', { pad: data.padName })}>
            {data === undefined ? (
              t('energy.page')
            ) : (
              <Figures text={headingOf(data, { month: name, soFar: growing }, format)} />
            )}
          </PageHeading>
          <MonthNav month={month} present={present} />
        </div>
      </div>
      {data === undefined ? (
        isError ? (
          <div className="border border-ink bg-sheet">
            <ErrorNotice error={error} onRetry={() => void refetch()} />
          </div>
        ) : (
          <div aria-busy="true" className="ruled h-96 border border-ink bg-sheet" />
        )
      ) : (
        <div aria-busy={isPlaceholderData} className="flex flex-col gap-4">
          <AnswerNotes {...data} now={now} />
          {data.totals.coveredSeconds === 0 ? null : <PadFigures energy={data} month={month} />}
          <HourSheet
            data={hours.data}
            error={hours.error}
            onRetry={() => void hours.refetch()}
            month={month}
            file={`energy-${month}-hours`}
          />
          <PadPumps pumps={data.pumps} currency={data.currency} />
        </div>
      )}
    </div>
  );
}

function PadFigures({ energy, month }: { readonly energy: PadEnergy; readonly month: string }) {
  const format = useFormat();
  const { totals, currency, saved, savedMissing, carbon, poolGallons, turnoversPerDay, fixedCharge, periods } = energy;
  const file = `energy-${month}-pad`;
  return (
    <>
      <FigureRow
        framed
        totals={totals}
        currency={currency}
        saved={saved}
        poolGallons={poolGallons}
        wanted={turnoversPerDay}
      />
      {fixedCharge === null ? null : (
        <p className="text-ink-2">
          <Figures
            text={t('energy.fixed', { cost: format.money(fixedCharge.cost, currency), days: fixedCharge.days })}
          />
        </p>
      )}
      <Sheet id="days">
        <div className="flex flex-col gap-4 px-4 py-3 sm:px-5">
          <SpanBars answer={energy} file={file} />
          <WaterBars answer={energy} wanted={turnoversPerDay} file={file} />
        </div>
      </Sheet>
      <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-4 lg:grid-cols-2">
        <PeriodTable periods={periods} currency={currency} file={`energy-${month}-periods`} />
        <SavedSheet saved={saved} missing={savedMissing} currency={currency} carbon={carbon} />
      </div>
    </>
  );
}
