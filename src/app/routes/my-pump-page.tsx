import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { chipClass } from '#src/components/ui/chip.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { nameOfPump } from '#src/features/pumps/pump-heading.ts';
import { pumpQueries } from '#src/features/pumps/pump-queries.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { paths } from '#src/lib/paths.ts';
import { HomePump } from './home-pump.tsx';
import { PumpSkeleton } from './pump-skeleton.tsx';

/** A homeowner's own pump, in plain words. Who has several chooses among them. */
export function MyPumpPage() {
  const { company } = useSession();
  const [search] = useSearchParams();
  const { data, isError, error, refetch } = useQuery(pumpQueries.mine());
  const asked = search.get('pump');
  const pump = data?.items.find(({ pumpId }) => pumpId === asked) ?? data?.items[0];
  return (
    <div className="mx-auto flex max-w-[62.5rem] flex-col gap-5 px-4 py-7 sm:px-7">
      {data === undefined || data.items.length < 2 ? null : (
        <nav aria-label={t('home.which')} className="flex flex-wrap gap-2">
          {data.items.map((each) => (
            <Link
              key={each.pumpId}
              to={paths.myPump(each.pumpId)}
              aria-current={each === pump ? 'true' : undefined}
              className={chipClass(each === pump)}
            >
              {nameOfPump(each)}
            </Link>
          ))}
        </nav>
      )}
      {pump === undefined ? (
        <PageHeading title={t('home.page')} size="large" />
      ) : (
        <HomePump key={pump.pumpId} pump={pump} />
      )}
      {isError && pump === undefined ? (
        <div className="border border-ink bg-sheet">
          <ErrorNotice error={error} onRetry={() => void refetch()} />
        </div>
      ) : null}
      {data?.items.length === 0 ? (
        <div className="border border-ink bg-sheet">
          <Notice title={t('home.noPump')}>
            <p>{t('home.noPump.detail', { company: company.name })}</p>
          </Notice>
        </div>
      ) : null}
      {data === undefined && !isError ? <PumpSkeleton /> : null}
    </div>
  );
}
