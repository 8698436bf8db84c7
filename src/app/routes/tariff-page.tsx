import { useQuery } from '@tanstack/react-query';
import { Link, useParams, useSearchParams } from 'react-router-dom';
import { SettingsPages } from '#src/app/shell/settings-pages.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { PendingSheet } from '#src/components/ui/pending-sheet.tsx';
import { TariffEditor } from '#src/features/tariffs/tariff-editor.tsx';
import { tariffQueries } from '#src/features/tariffs/tariff-queries.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { paths } from '#src/lib/paths.ts';

const NEW = 'new';
const USUAL_CURRENCY = 'USD';

/** Settings › Tariffs › one: made, copied or changed. */
export function TariffPage() {
  const { tariffId = NEW } = useParams();
  const [search] = useSearchParams();
  const isNew = tariffId === NEW;
  const sourceId = isNew ? (search.get('from') ?? '') : tariffId;
  const source = useQuery(tariffQueries.read(sourceId));
  const { company } = useSession();
  const from = isNew && source.data !== undefined ? copyOf(source.data.tariff) : undefined;
  const title =
    !isNew && source.data !== undefined ? t('tariff.edit', { name: source.data.tariff.name }) : t('tariff.new');
  return (
    <div className="mx-auto flex max-w-6xl flex-col gap-4 px-4 py-5 sm:px-7">
      <SettingsPages />
      <div>
        <PageHeading title={title}>{title}</PageHeading>
        <p className="mt-1 max-w-prose text-ink-2">{t('tariff.zone', { zone: company.zone.replaceAll('_', ' ') })}</p>
        <p className="mt-1">
          <Link to={paths.tariffs()} className="underline underline-offset-2">
            {t('tariff.back')}
          </Link>
        </p>
      </div>
      {sourceId === '' || source.data !== undefined ? (
        <TariffEditor
          key={`${tariffId} ${sourceId}`}
          row={isNew ? undefined : source.data}
          from={from}
          currency={from?.currency ?? USUAL_CURRENCY}
        />
      ) : (
        <PendingSheet error={source.error ?? undefined} onRetry={() => void source.refetch()} />
      )}
    </div>
  );
}

const copyOf = <Named extends { readonly name: string }>(tariff: Named): Named => ({
  ...tariff,
  name: t('tariffs.copyOf', { name: tariff.name }),
});
