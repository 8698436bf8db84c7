import { useQuery } from '@tanstack/react-query';
import { type CarbonPurpose, findCarbonFactor } from '#shared/domain/energy/carbon.ts';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Select } from '#src/components/ui/select.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { tariffQueries } from './tariff-queries.ts';
import { useChooseCarbon } from './use-choose-carbon.ts';

const NONE = '';

/** The grid whose emission factors stand beside energy, with their years. */
export function CarbonSheet() {
  const { data, isError, error, refetch } = useQuery(tariffQueries.carbon());
  const choose = useChooseCarbon();
  return (
    <Sheet id="carbon" title={t('carbon.title')}>
      <div className="flex flex-col gap-3 px-4 py-4 sm:px-5">
        <p className="max-w-prose text-ink-2">{t('carbon.lead')}</p>
        {data !== undefined ? (
          <>
            <Select
              label={t('carbon.grid')}
              value={data.region ?? NONE}
              options={[
                { value: NONE, label: t('carbon.none') },
                ...data.regions.map((region) => ({ value: region, label: region })),
              ]}
              onChange={(value) =>
                choose.mutate({ region: value === NONE ? null : value, before: data.region, version: data.version })
              }
            />
            {data.region === null ? null : (
              <ul className="figures text-13 text-ink-2">
                <Factor region={data.region} purpose="consumption" />
                <Factor region={data.region} purpose="savings" />
              </ul>
            )}
          </>
        ) : isError ? (
          <ErrorNotice error={error} onRetry={() => void refetch()} />
        ) : (
          <div aria-busy="true" className="ruled h-16" />
        )}
      </div>
    </Sheet>
  );
}

function Factor({ region, purpose }: { readonly region: string; readonly purpose: CarbonPurpose }) {
  const { number } = useFormat();
  const found = findCarbonFactor(region, purpose);
  const isUse = purpose === 'consumption';
  return (
    <li>
      {found === undefined
        ? t(isUse ? 'carbon.use.unknown' : 'carbon.savings.unknown')
        : t(isUse ? 'carbon.use' : 'carbon.savings', {
            factor: number(found.kilogramsPerKwh, 3),
            year: String(found.year),
          })}
    </li>
  );
}
