import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import type { AlarmHealth } from '#shared/contract/http/alarm-health.ts';
import { DAY_MS } from '#shared/domain/time/local-time.ts';
import { chipClass } from '#src/components/ui/chip.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { Select } from '#src/components/ui/select.tsx';
import { HEALTH_RANGES, HEALTH_USUAL, parseHealthAddress } from '#src/features/alarm-health/health-address.ts';
import { HealthDays } from '#src/features/alarm-health/health-days.tsx';
import { HealthFacts } from '#src/features/alarm-health/health-facts.tsx';
import { healthQueries } from '#src/features/alarm-health/health-queries.ts';
import { headingOf } from '#src/features/alarm-health/health-view.ts';
import { OffendersSheet } from '#src/features/alarm-health/offenders-sheet.tsx';
import { PeopleSheet } from '#src/features/alarm-health/people-sheet.tsx';
import { SeenSheet } from '#src/features/alarm-health/seen-sheet.tsx';
import { StaleSheet } from '#src/features/alarm-health/stale-sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { useNow } from '#src/hooks/use-now.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/health-words.ts';
import { paths } from '#src/lib/paths.ts';
import { changeSearch } from '#src/lib/read-search.ts';

const DESK = '';

/** How the alarms themselves do: whether those who get them can still answer them. */
export function AlarmHealthPage() {
  const format = useFormat();
  const { company } = useSession();
  const [search, setSearch] = useSearchParams();
  const { range, who } = parseHealthAddress(search);
  const now = useNow(60_000);
  const { data, isError, error, refetch, isPlaceholderData } = useQuery(
    healthQueries.figures(range, company.zone, now),
  );
  const person = data?.operators.find(({ operatorId }) => operatorId === who);
  const figures = person?.figures ?? data?.desk;
  const set = (change: Readonly<Record<string, string | undefined>>) =>
    setSearch((current) => changeSearch(current, change, HEALTH_USUAL), { preventScrollReset: true });
  return (
    <div className="mx-auto flex max-w-[90rem] flex-col gap-4 px-4 py-5 sm:px-7">
      <div>
        <Link to={paths.alarms()} data-print="never" className="text-ink-2 underline underline-offset-2">
          {t('health.back')}
        </Link>
        <PageHeading title={t('health.page')}>
          {figures === undefined ? t('health.page') : <Figures text={headingOf(figures, format)} />}
        </PageHeading>
        <p className="mt-1 max-w-prose text-ink-2">{t('health.lead')}</p>
      </div>
      <div data-print="never" className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <nav aria-label={t('health.range')} className="flex flex-wrap gap-1.5">
          {HEALTH_RANGES.map((each) => (
            <Link
              key={each}
              to={{ search: `${changeSearch(search, { range: each }, HEALTH_USUAL)}` }}
              aria-current={each === range ? 'true' : undefined}
              className={chipClass(each === range)}
            >
              {t(`health.range.${each}`)}
            </Link>
          ))}
        </nav>
        <Select
          label={t('health.who')}
          value={person?.operatorId ?? DESK}
          onChange={(value) => set({ who: value })}
          options={[
            { value: DESK, label: t('health.who.desk') },
            ...(data?.operators ?? []).map(({ operatorId, name }) => ({ value: operatorId, label: name })),
          ]}
        />
      </div>
      {isError && data === undefined ? (
        <div className="border border-ink bg-sheet">
          <ErrorNotice error={error} onRetry={() => void refetch()} />
        </div>
      ) : data === undefined || figures === undefined ? (
        <div aria-busy="true" className="ruled h-96 border border-ink bg-sheet" />
      ) : (
        <div aria-busy={isPlaceholderData} className="flex flex-col gap-4">
          <Measured health={data} />
          <HealthFacts figures={figures} zone={data.zone} />
          <HealthDays byDay={figures.byDay} zone={data.zone} />
          <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-4 lg:grid-cols-2">
            <div className="flex min-w-0 flex-col gap-4">
              <OffendersSheet figures={figures} />
              <StaleSheet stale={figures.stale} zone={data.zone} now={now} />
            </div>
            <div className="flex min-w-0 flex-col gap-4">
              <SeenSheet acknowledging={figures.acknowledging} />
              <PeopleSheet operators={data.operators} />
            </div>
          </div>
        </div>
      )}
    </div>
  );
}

/** What time the figures are of, and whether it is long enough. */
function Measured({ health: { from, until, zone, leastDays } }: { readonly health: AlarmHealth }) {
  const format = useFormat();
  const days = (until - from) / DAY_MS;
  return (
    <p className="text-ink-2">
      <Figures
        text={t('health.span', { from: format.dayWithYear(from, zone), to: format.dayWithYear(until - 1, zone) })}
      />
      {days < leastDays ? (
        <strong className="ml-3 font-semibold text-ink">
          <Figures text={t('health.short', { count: Math.floor(days), least: leastDays })} />
        </strong>
      ) : null}
    </p>
  );
}
