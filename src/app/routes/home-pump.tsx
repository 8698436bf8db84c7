import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import type { PumpRow } from '#shared/contract/http/pumps.ts';
import type { Run } from '#shared/contract/http/runs.ts';
import { localDayAt } from '#shared/domain/time/local-days.ts';
import { buttonClass } from '#src/components/ui/button.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { useAlarmEvents } from '#src/features/alarms/use-alarm-events.ts';
import { HomeEnergy } from '#src/features/energy/home-energy.tsx';
import { HomeStrip } from '#src/features/pumps/home-strip.tsx';
import { viewHome } from '#src/features/pumps/home-view.ts';
import { LatelyList } from '#src/features/pumps/lately-list.tsx';
import { listLately } from '#src/features/pumps/lately-view.ts';
import { pumpQueries } from '#src/features/pumps/pump-queries.ts';
import { useStrip } from '#src/features/pumps/strip-source.tsx';
import { useDay } from '#src/features/pumps/use-day.ts';
import { useFormat } from '#src/hooks/use-format.ts';
import { useNow } from '#src/hooks/use-now.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { useWatchedPumps } from '#src/hooks/use-watched-pumps.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { createStore } from '#src/lib/store.ts';

const WEEK_MS = 7 * 86_400_000;
const HOUR_MS = 3_600_000;
const NO_RUNS: readonly Run[] = [];

/** One pump for the person who lives with it: a fact, today, what happened lately. */
export function HomePump({ pump }: { readonly pump: PumpRow }) {
  const format = useFormat();
  const { company } = useSession();
  const now = useNow(15_000);
  const [cursor] = useState(() => createStore<number | undefined>(undefined));
  const day = useDay(pump.zone, now);
  const { data: detail } = useQuery(pumpQueries.detail(pump.pumpId));
  const strip = useStrip(pump.pumpId, day);
  const hour = Math.floor(now / HOUR_MS) * HOUR_MS;
  const week = useStrip(
    pump.pumpId,
    useMemo(() => ({ from: hour - WEEK_MS, until: hour + HOUR_MS }), [hour]),
  );
  const alarms = useAlarmEvents(pump.pumpId, hour - WEEK_MS, now);
  const lately = useMemo(
    () => week.runs && [...listLately(week.runs, now), ...alarms].sort((a, b) => b.at - a.at),
    [week.runs, alarms, now],
  );
  useWatchedPumps([pump.pumpId]);
  const { heading, lead, trouble } = viewHome(pump, company, format, now);
  return (
    <>
      <div className="pb-1">
        <PageHeading title={t('home.page')} size="large">
          <Figures text={heading} />
        </PageHeading>
        <p className="mt-2 max-w-prose text-20 text-ink-2">{lead.join(' ')}</p>
        {trouble && company.phone !== null ? (
          <a href={`tel:${company.phone.replaceAll(/[^\d+]/g, '')}`} className={`mt-4 ${buttonClass('main', true)}`}>
            {t('home.call', { company: company.name, phone: company.phone })}
          </a>
        ) : null}
      </div>
      <HomeStrip
        pump={pump}
        strip={strip}
        day={day}
        visibleFrom={detail?.visibleFrom ?? now}
        now={now}
        cursor={cursor}
      />
      {detail === undefined ? null : (
        <HomeEnergy
          pumpId={pump.pumpId}
          zone={pump.zone}
          poolGallons={detail.poolGallons}
          since={Math.max(detail.visibleFrom, detail.motor?.installedAt ?? 0)}
          runs={week.runs ?? NO_RUNS}
          dayFrom={localDayAt(pump.zone, now)?.from ?? now}
          now={now}
        />
      )}
      <LatelyList events={lately} zone={pump.zone} now={now} />
      <p className="text-ink-2">{t('home.onlyWatches')}</p>
    </>
  );
}
