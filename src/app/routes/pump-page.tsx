import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { useParams } from 'react-router-dom';
import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import { StripLegend } from '#src/components/charts/strip/strip-legend.tsx';
import { USUAL_TOP_RPM } from '#src/components/charts/strip/strip-metrics.ts';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { PumpAlarms } from '#src/features/alarms/pump-alarms.tsx';
import { PumpAdviceSheet } from '#src/features/energy/pump-advice-sheet.tsx';
import { PumpEnergySheet } from '#src/features/energy/pump-energy-sheet.tsx';
import { DaySheet } from '#src/features/pumps/day-sheet.tsx';
import { EquipmentSheet } from '#src/features/pumps/equipment-sheet.tsx';
import { flowWords } from '#src/features/pumps/flow-words.ts';
import { nameOfPump, pumpHeading } from '#src/features/pumps/pump-heading.ts';
import { pumpQueries } from '#src/features/pumps/pump-queries.ts';
import { SettingsSheet } from '#src/features/pumps/settings-sheet.tsx';
import { useStrip } from '#src/features/pumps/strip-source.tsx';
import { UnitSheet } from '#src/features/pumps/unit-sheet.tsx';
import { useDay } from '#src/features/pumps/use-day.ts';
import { WiringSheet } from '#src/features/pumps/wiring-sheet.tsx';
import { ReadingCharts } from '#src/features/readings/reading-charts.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { useNow } from '#src/hooks/use-now.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { useWatchedPumps } from '#src/hooks/use-watched-pumps.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { createStore } from '#src/lib/store.ts';
import { PumpSkeleton } from './pump-skeleton.tsx';

/** One pump: its day, what it should have done, what it is set to. */
export function PumpPage() {
  const { pumpId = '' } = useParams();
  const { data: pump, isError, error, refetch } = useQuery(pumpQueries.detail(pumpId));
  if (pump !== undefined) return <LoadedPump pump={pump} />;
  return (
    <div className="px-4 py-5 sm:px-7">
      <PageHeading title={t('pump.page')} />
      {isError ? (
        <div className="mt-4 border border-ink bg-sheet">
          <ErrorNotice error={error} onRetry={() => void refetch()} />
        </div>
      ) : (
        <PumpSkeleton />
      )}
    </div>
  );
}

function LoadedPump({ pump }: { readonly pump: PumpDetail }) {
  const format = useFormat();
  const { user } = useSession();
  const now = useNow(10_000);
  const [cursor] = useState(() => createStore<number | undefined>(undefined));
  const day = useDay(pump.zone, now);
  const window = useMemo(() => ({ from: day.from, until: day.until }), [day.from, day.until]);
  const strip = useStrip(pump.pumpId, window);
  useWatchedPumps([pump.pumpId]);
  const flow = flowWords(pump, format);
  return (
    <div className="mx-auto flex max-w-[90rem] flex-col gap-4 px-4 py-5 sm:px-7">
      <div>
        <PageHeading title={nameOfPump(pump)}>
          <Figures text={pumpHeading(pump, format, now)} />
        </PageHeading>
        {flow === undefined ? null : (
          <p className="text-ink-2">
            <Figures text={flow} />
          </p>
        )}
        {pump.learning ? <p className="text-ink-2">{t('pump.learning')}</p> : null}
      </div>
      <DaySheet pump={pump} strip={strip} day={day} now={now} cursor={cursor} />
      <Sheet id="readings">
        <ReadingCharts
          pumpId={pump.pumpId}
          window={window}
          zone={pump.zone}
          now={pump.now}
          growing={day.isToday}
          topRpm={Math.max(USUAL_TOP_RPM, pump.settings.maxRpm)}
          cursor={cursor}
        />
      </Sheet>
      <div className="grid items-start gap-4 lg:grid-cols-2">
        <div className="flex min-w-0 flex-col gap-4">
          <PumpAlarms pumpId={pump.pumpId} linked={user.role !== 'homeowner'} now={now} />
          <WiringSheet pump={pump} />
        </div>
        <div className="flex min-w-0 flex-col gap-4">
          <SettingsSheet pump={pump} />
          <EquipmentSheet pump={pump} />
          <UnitSheet pump={pump} />
        </div>
      </div>
      <PumpEnergySheet pump={pump} />
      {user.role === 'homeowner' ? null : (
        <PumpAdviceSheet pumpId={pump.pumpId} name={nameOfPump(pump)} zone={pump.zone} now={now} />
      )}
      <StripLegend inputs={pump.traits.inputCount} />
    </div>
  );
}
