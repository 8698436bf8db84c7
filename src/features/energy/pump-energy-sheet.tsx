import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import type { PumpEnergy } from '#shared/contract/http/energy.ts';
import { chipClass } from '#src/components/ui/chip.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { useNow } from '#src/hooks/use-now.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { paths } from '#src/lib/paths.ts';
import { changeSearch } from '#src/lib/read-search.ts';
import { AnswerNotes } from './answer-notes.tsx';
import { ENERGY_USUAL } from './energy-address.ts';
import { energyQueries } from './energy-queries.ts';
import { FigureRow } from './figure-row.tsx';
import {
  dayAfter,
  dayAt,
  daysOfMonth,
  earlierOf,
  monthAt,
  nameOfMonth,
  parseMonth,
  shiftMonth,
  usualMonth,
} from './local-month.ts';
import { MonthNav } from './month-nav.tsx';
import { SavedFacts } from './saved-facts.tsx';
import { SpanBars } from './span-bars.tsx';
import { WaterBars } from './water-bars.tsx';

export type EnergyPump = {
  readonly pumpId: string;
  readonly padId: string;
  readonly zone: string;
  readonly poolGallons: number | null;
  readonly turnoversPerDay: number | null;
  readonly visibleFrom: number;
};

/** By month the bars reach so far back. */
const MONTHS_BACK = 23;

/** What the address asks for: a month day by day, or the last two years month by month. */
function useAsked({ zone, visibleFrom }: EnergyPump, now: number) {
  const [search] = useSearchParams();
  const by = search.get('by') === 'month' ? ('month' as const) : ('day' as const);
  const present = monthAt(zone, now);
  const today = dayAt(zone, now);
  const first = dayAt(zone, visibleFrom);
  const usual = usualMonth(today, first.slice(0, 7));
  const month = earlierOf(parseMonth(search.get('month')) ?? usual, present);
  const from = [`${shiftMonth(present, -MONTHS_BACK)}-01`, first].sort().at(-1) ?? first;
  const span =
    by === 'month'
      ? { from, until: dayAfter(today), by, growing: true }
      : { ...(daysOfMonth(month, today) ?? { from: today, until: dayAfter(today) }), by, growing: month === present };
  return { by, month, present, usual, span };
}

/** What a pump used, cost and moved, by day or month, and what was saved; every figure with how sure it is. */
export function PumpEnergySheet({ pump }: { readonly pump: EnergyPump }) {
  const format = useFormat();
  const { user } = useSession();
  const now = useNow(60_000);
  const [search] = useSearchParams();
  const { by, month, present, usual, span } = useAsked(pump, now);
  const { data, isError, error, refetch, isPlaceholderData } = useQuery(energyQueries.pump(pump.pumpId, span));
  const name = nameOfMonth(month, format.locale);
  const to = (next: 'day' | 'month') => ({ search: `${changeSearch(search, { by: next }, ENERGY_USUAL)}` });
  return (
    <Sheet
      id="energy"
      title={by === 'day' ? `${t('energy.of')}, ${name}` : t('energy.of')}
      aside={
        <div className="flex flex-wrap items-center gap-2">
          {by === 'day' ? (
            <MonthNav month={month} present={present} usual={usual} first={monthAt(pump.zone, pump.visibleFrom)} />
          ) : null}
          <nav aria-label={t('energy.by')} data-print="never" className="flex gap-1.5">
            {(['day', 'month'] as const).map((each) => (
              <Link
                key={each}
                to={to(each)}
                preventScrollReset
                aria-current={by === each ? 'true' : undefined}
                className={chipClass(by === each)}
              >
                {t(`energy.by.${each}`)}
              </Link>
            ))}
          </nav>
        </div>
      }
    >
      {data === undefined ? (
        isError ? (
          <ErrorNotice error={error} onRetry={() => void refetch()} />
        ) : (
          <div aria-busy="true" className="ruled h-64" />
        )
      ) : (
        <div aria-busy={isPlaceholderData} className="flex flex-col gap-4 px-4 py-4 sm:px-5">
          <PumpFigures pump={pump} energy={data} now={now} file={`energy-${by === 'day' ? month : 'months'}`} />
          {user.role === 'manager' ? (
            <Link to={paths.padEnergy(pump.padId, { month })} className="self-start underline underline-offset-2">
              {t('energy.toPad')}
            </Link>
          ) : null}
        </div>
      )}
    </Sheet>
  );
}

type PumpFiguresProps = {
  readonly pump: EnergyPump;
  readonly energy: PumpEnergy;
  readonly now: number;
  readonly file: string;
};

function PumpFigures({ pump, energy, now, file }: PumpFiguresProps) {
  const { totals, currency, saved, savedMissing, carbon, gaps, gapCount } = energy;
  const notes = <AnswerNotes {...energy} now={now} gaps={{ count: gapCount, longest: gaps[0] }} />;
  if (totals.coveredSeconds === 0) {
    return (
      <>
        <p>{t('energy.none')}</p>
        {notes}
      </>
    );
  }
  return (
    <>
      <FigureRow
        totals={totals}
        currency={currency}
        saved={saved}
        poolGallons={pump.poolGallons}
        wanted={pump.turnoversPerDay}
      />
      <SpanBars answer={energy} file={file} />
      {energy.by === 'day' ? <WaterBars answer={energy} wanted={pump.turnoversPerDay} file={file} /> : null}
      <div id="saved">
        <h3 className="pb-1 font-semibold">{t('energy.saved.title')}</h3>
        <SavedFacts saved={saved} missing={savedMissing} currency={currency} carbon={carbon} />
      </div>
      {notes}
    </>
  );
}
