import { useQuery } from '@tanstack/react-query';
import { SettingsPages } from '#src/app/shell/settings-pages.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { PendingSheet } from '#src/components/ui/pending-sheet.tsx';
import { CarbonSheet } from '#src/features/tariffs/carbon-sheet.tsx';
import { CompanyTermsSheet } from '#src/features/tariffs/company-terms-sheet.tsx';
import { PadsSheet } from '#src/features/tariffs/pads-sheet.tsx';
import { TariffList } from '#src/features/tariffs/tariff-list.tsx';
import { tariffQueries } from '#src/features/tariffs/tariff-queries.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { localToday } from '#src/lib/local-today.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';

/** Settings › Tariffs: what energy costs, which tariff holds when and where, the grid's carbon. */
export function TariffsPage() {
  const list = useQuery(tariffQueries.list());
  const terms = useQuery(tariffQueries.companyTerms());
  const { company } = useSession();
  const today = localToday(company.zone);
  return (
    <div className="mx-auto flex max-w-6xl flex-col gap-4 px-4 py-5 sm:px-7">
      <SettingsPages />
      <div>
        <PageHeading title={t('tariffs.page')}>{t('tariffs.page')}</PageHeading>
        <p className="mt-1 max-w-prose text-ink-2">{t('tariffs.lead')}</p>
      </div>
      {list.data !== undefined && terms.data !== undefined ? (
        <>
          <TariffList tariffs={list.data.items} terms={terms.data.terms} today={today} />
          <CompanyTermsSheet stored={terms.data} tariffs={list.data.items} today={today} />
          <PadsSheet tariffs={list.data.items} today={today} />
        </>
      ) : (
        <PendingSheet
          error={list.error ?? terms.error ?? undefined}
          onRetry={() => {
            void list.refetch();
            void terms.refetch();
          }}
        />
      )}
      <CarbonSheet />
    </div>
  );
}
