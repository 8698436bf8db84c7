import { useQuery } from '@tanstack/react-query';
import { useCallback, useMemo, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { FleetPage as FleetPageData } from '#shared/contract/http/pumps.ts';
import { StripLegend } from '#src/components/charts/strip/strip-legend.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { parseFleetAddress } from '#src/features/fleet/fleet-address.ts';
import { FleetEmpty } from '#src/features/fleet/fleet-empty.tsx';
import { FleetFilters } from '#src/features/fleet/fleet-filters.tsx';
import { fleetQueries } from '#src/features/fleet/fleet-queries.ts';
import { FleetTotals } from '#src/features/fleet/fleet-totals.tsx';
import { FleetWall } from '#src/features/fleet/fleet-wall.tsx';
import { headingOf } from '#src/features/fleet/heading-of.ts';
import { TimeTravel } from '#src/features/fleet/time-travel.tsx';
import { useWallRows } from '#src/features/fleet/use-wall-rows.ts';
import { WallSkeleton } from '#src/features/fleet/wall-skeleton.tsx';
import { wallWindow } from '#src/features/fleet/wall-window.ts';
import { StripSource } from '#src/features/pumps/strip-source.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { useNow } from '#src/hooks/use-now.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/t.ts';
import { createStore } from '#src/lib/store.ts';

const NOW_STEP_MS = 30_000;

/** How many of all are left, where a filter leaves some out. */
const matchingLine = (page: FleetPageData | undefined, all: number | undefined): string | undefined =>
  page === undefined || all === undefined || page.matching === all
    ? undefined
    : t('fleet.matching', { count: page.matching, all });

/** The manager's wall: what the whole fleet does and did, worst first. */
export function FleetPage() {
  const format = useFormat();
  const { company } = useSession();
  const [search] = useSearchParams();
  const now = useNow(NOW_STEP_MS);
  const [held, setHeld] = useState(false);
  const hold = {
    onPointerEnter: () => setHeld(true),
    onPointerLeave: () => setHeld(false),
    onFocus: () => setHeld(true),
    onBlur: () => setHeld(false),
  };
  const [cursor] = useState(() => createStore<number | undefined>(undefined));
  const view = useMemo(() => parseFleetAddress(search), [search]);
  const window = wallWindow(view.range, view.day, now, company.zone);
  const wall = useWallRows(view.filter, held);
  const { filter } = view;
  const { data: counted } = useQuery(fleetQueries.totals({ q: filter.q, area: filter.area }));
  const { fetchNextPage, hasNextPage, isFetchingNextPage, isError, error, refetch, isPending } = wall.query;
  const onNearEnd = useCallback(() => {
    if (hasNextPage && !isFetchingNextPage) void fetchNextPage();
  }, [hasNextPage, isFetchingNextPage, fetchNextPage]);
  const totals = counted?.totals ?? wall.first?.totals;
  const title = headingOf(view, window, format, company.zone);
  const inputs = Math.max(3, ...wall.rows.map(({ traits }) => traits.inputCount));

  return (
    <div className="px-4 pb-10 sm:px-7">
      <div className="flex flex-wrap items-baseline gap-x-9 gap-y-2 pt-5 pb-3.5">
        <PageHeading title={title} />
        {totals === undefined ? null : <FleetTotals totals={totals} past={!window.live} />}
        <div data-print="never" className="lg:ml-auto">
          <TimeTravel range={view.range} window={window} />
        </div>
      </div>
      <div data-print="never" className="pb-3">
        <FleetFilters areas={wall.first?.areas ?? []} />
      </div>
      {isError && wall.rows.length === 0 ? (
        <div className="border border-ink bg-sheet">
          <ErrorNotice error={error} onRetry={() => void refetch()} />
        </div>
      ) : isPending ? (
        <WallSkeleton />
      ) : wall.rows.length === 0 ? (
        <FleetEmpty view={view} />
      ) : (
        <div {...hold}>
          <FleetWall
            rows={wall.rows}
            matching={wall.first?.matching ?? wall.rows.length}
            window={window}
            companyZone={company.zone}
            now={now}
            cursor={cursor}
            StripSource={StripSource}
            onNearEnd={onNearEnd}
            onResort={wall.moved ? wall.resort : undefined}
          />
        </div>
      )}
      <p role="status" className="py-2 text-13 text-ink-2">
        {isFetchingNextPage
          ? t('fleet.loadingMore')
          : [matchingLine(wall.first, totals?.pumps), t('fleet.zone', { zone: format.zoneName(now, company.zone) })]
              .filter((line) => line !== undefined)
              .join(' · ')}
      </p>
      <StripLegend inputs={inputs} />
    </div>
  );
}
