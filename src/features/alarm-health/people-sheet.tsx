import { Link, useSearchParams } from 'react-router-dom';
import type { AlarmHealth } from '#shared/contract/http/alarm-health.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/health-words.ts';
import { changeSearch } from '#src/lib/read-search.ts';
import { HEALTH_USUAL } from './health-address.ts';
import { countOver } from './health-view.ts';

type Person = AlarmHealth['operators'][number];

/** The same figures person by person: each name opens theirs. */
export function PeopleSheet({ operators }: { readonly operators: readonly Person[] }) {
  const format = useFormat();
  const [search] = useSearchParams();
  const to = (who: string) => ({ search: `${changeSearch(search, { who }, HEALTH_USUAL)}` });
  return (
    <Sheet id="people" title={t('health.people')}>
      <div className="flex flex-col gap-2 px-4 py-3 sm:px-5">
        {operators.length === 0 ? (
          <p className="text-ink-2">{t('health.people.none')}</p>
        ) : (
          <DataTable
            caption={t('health.people')}
            rows={operators}
            keyOf={({ operatorId }) => operatorId}
            columns={[
              {
                head: t('health.people.name'),
                cell: ({ operatorId, name }: Person) => (
                  <Link to={to(operatorId)} className="underline underline-offset-2 hover:bg-wash">
                    {name}
                  </Link>
                ),
              },
              {
                head: t('health.seen.count'),
                figures: true,
                right: true,
                cell: ({ figures }) => format.number(figures.count),
              },
              {
                head: t('health.metric.rate'),
                figures: true,
                right: true,
                cell: ({ figures }) => format.number(figures.perDay, 1),
              },
              {
                head: t('health.metric.peak'),
                figures: true,
                right: true,
                cell: ({ figures }) => format.number(figures.periods.most),
              },
              {
                head: t('health.people.over'),
                figures: true,
                right: true,
                cell: ({ figures }) => format.number(countOver(figures)),
              },
            ]}
          />
        )}
        <p className="text-13 text-ink-2">{t('health.people.detail')}</p>
      </div>
    </Sheet>
  );
}
