import { Link, useSearchParams } from 'react-router-dom';
import type { FleetPage } from '#shared/contract/http/pumps.ts';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/t.ts';
import { paths } from '#src/lib/paths.ts';
import { changeFleetAddress, type FleetChange, parseFleetAddress } from './fleet-address.ts';

type Total = {
  readonly name: 'running' | 'idle' | 'urgent' | 'soon' | 'note' | 'silent';
  readonly tone?: string;
  /** What a click narrows the wall to. */
  readonly change?: FleetChange;
};

const TOTALS: readonly Total[] = [
  { name: 'running', change: { filter: 'running' } },
  { name: 'idle' },
  { name: 'urgent', tone: 'text-p1', change: { priority: 'urgent' } },
  { name: 'soon', tone: 'text-p2', change: { priority: 'soon' } },
  { name: 'note', tone: 'text-p3', change: { priority: 'note' } },
  { name: 'silent', change: { filter: 'silent' } },
];

export type FleetTotalsProps = {
  readonly totals: FleetPage['totals'];
  /** The wall shows a day gone by: the numbers and the marks are of now all the same, and say so. */
  readonly past: boolean;
};

/** What the fleet does, in numbers; most of them narrow the wall to what they count. A zero is left uncoloured. */
export function FleetTotals({ totals, past }: FleetTotalsProps) {
  const format = useFormat();
  const [search] = useSearchParams();
  const { filter } = parseFleetAddress(search);
  return (
    <ul className="flex flex-wrap items-baseline gap-x-6 gap-y-1 text-ink-2">
      {past ? <li>{t('fleet.totals.now')}</li> : null}
      <li>
        <span className="figures mr-1.5 text-20 font-semibold text-ink">{format.number(totals.pumps)}</span>
        {t('fleet.totals.pumpsWord', { count: totals.pumps })}
      </li>
      {TOTALS.map(({ name, tone, change }) => {
        const count = totals[name];
        const colour = count > 0 ? tone : undefined;
        const words = (
          <>
            <span className={`figures mr-1.5 text-20 font-semibold ${colour ?? 'text-ink'}`}>
              {format.number(count)}
            </span>
            {t(`fleet.totals.${name}`)}
          </>
        );
        if (change === undefined) return <li key={name}>{words}</li>;
        const on = change.filter === undefined ? filter.priority === change.priority : filter.filter === change.filter;
        const next = on
          ? { filter: undefined, priority: undefined }
          : { filter: undefined, priority: undefined, ...change };
        return (
          <li key={name}>
            <Link
              to={`${paths.fleet()}?${changeFleetAddress(search, next)}`}
              aria-current={on ? 'true' : undefined}
              className={`inline-block min-h-6 decoration-2 underline-offset-4 hover:underline aria-[current]:underline ${colour ?? ''}`}
            >
              {words}
            </Link>
          </li>
        );
      })}
    </ul>
  );
}
