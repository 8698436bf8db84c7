import { Link } from 'react-router-dom';
import type { TariffRow } from '#shared/contract/http/tariffs.ts';
import { Button, buttonClass } from '#src/components/ui/button.tsx';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { paths } from '#src/lib/paths.ts';
import { priceRange } from './price-range.ts';
import { useDeleteTariff } from './use-delete-tariff.ts';
import { type TermsToday, usersText } from './users-text.ts';

export type TariffListProps = TermsToday & { readonly tariffs: readonly TariffRow[] };

/** The company's tariffs by name, with who goes by each. */
export function TariffList({ tariffs, terms, today }: TariffListProps) {
  const format = useFormat();
  const { price } = format;
  const remove = useDeleteTariff();
  const add = (
    <Link to={paths.tariff('new')} className={buttonClass(tariffs.length === 0 ? 'main' : 'plain')}>
      {t('tariffs.new')}
    </Link>
  );
  if (tariffs.length === 0)
    return (
      <Sheet id="tariffs" title={t('tariffs.list')}>
        <Notice title={t('tariffs.empty')} actions={add}>
          {t('tariffs.empty.detail')}
        </Notice>
      </Sheet>
    );
  const priceOf = ({ tariff }: TariffRow): string => {
    const { least, most } = priceRange(tariff);
    const [from, to] = [price(least, tariff.currency), price(most, tariff.currency)];
    return least === most ? from : t('tariffs.price.range', { least: from, most: to });
  };
  return (
    <Sheet id="tariffs" title={t('tariffs.list')} aside={add}>
      <div className="px-4 py-2 sm:px-5">
        <DataTable
          caption={t('tariffs.list')}
          wide
          rows={tariffs}
          keyOf={({ id }) => id}
          columns={[
            {
              head: t('tariffs.col.name'),
              cell: ({ id, tariff }) => (
                <Link to={paths.tariff(id)} className="underline underline-offset-2">
                  {tariff.name}
                </Link>
              ),
            },
            { head: t('tariffs.col.users'), cell: (row) => usersText(row, { terms, today }, format) },
            { head: t('tariffs.col.price'), figures: true, cell: priceOf },
            {
              head: t('tariffs.col.acts'),
              cell: (row) => (
                <span className="flex gap-2">
                  <Link
                    to={paths.tariff('new', { from: row.id })}
                    aria-label={t('tariffs.copyNamed', { name: row.tariff.name })}
                    className={buttonClass()}
                  >
                    {t('tariffs.copy')}
                  </Link>
                  {row.isCompanys || row.pads > 0 ? null : (
                    <Button
                      aria-label={t('tariffs.deleteNamed', { name: row.tariff.name })}
                      disabled={remove.isPending}
                      onClick={() => remove.mutate(row)}
                    >
                      {t('tariffs.delete')}
                    </Button>
                  )}
                </span>
              ),
            },
          ]}
        />
      </div>
    </Sheet>
  );
}
