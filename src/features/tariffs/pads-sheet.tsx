import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { PadWithTerms, TariffRow } from '#shared/contract/http/tariffs.ts';
import { Button } from '#src/components/ui/button.tsx';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { SearchField } from '#src/components/ui/search-field.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { t } from '#src/lib/messages/tariffs-words.ts';
import { PadTermsEditor } from './pad-terms-editor.tsx';
import { tariffQueries } from './tariff-queries.ts';

export type PadsSheetProps = { readonly tariffs: readonly TariffRow[]; readonly today: string };

type Picked = { readonly padId: string; readonly padName: string };

/** Pads on another rate than the company's, and where any pad gets one. */
export function PadsSheet({ tariffs, today }: PadsSheetProps) {
  const [picked, setPicked] = useState<Picked>();
  const { data, isError, error, refetch } = useQuery(tariffQueries.pads());
  return (
    <Sheet id="pads" title={t('pads.title')}>
      <div className="flex flex-col gap-4 px-4 py-4 sm:px-5">
        <p className="max-w-prose text-ink-2">{t('pads.lead')}</p>
        <FindPad onPick={setPicked} />
        {picked === undefined ? null : (
          <PadTermsEditor {...picked} tariffs={tariffs} today={today} onClose={() => setPicked(undefined)} />
        )}
        {data !== undefined ? (
          <PadTable pads={data.items} count={data.count} tariffs={tariffs} onPick={setPicked} />
        ) : isError ? (
          <ErrorNotice error={error} onRetry={() => void refetch()} />
        ) : (
          <div aria-busy="true" className="ruled h-24" />
        )}
      </div>
    </Sheet>
  );
}

type PadTableProps = {
  readonly pads: readonly PadWithTerms[];
  readonly count: number;
  readonly tariffs: readonly TariffRow[];
  readonly onPick: (pad: Picked) => void;
};

function PadTable({ pads, count, tariffs, onPick }: PadTableProps) {
  if (pads.length === 0) return <p>{t('pads.none')}</p>;
  const names = new Map(tariffs.map(({ id, tariff }) => [id, tariff.name]));
  return (
    <>
      <DataTable
        caption={t('pads.title')}
        wide
        rows={pads}
        keyOf={({ padId }) => padId}
        columns={[
          { head: t('pads.col.pad'), cell: ({ padName }) => padName },
          { head: t('pads.col.customer'), cell: ({ customerName }) => customerName ?? '–' },
          { head: t('pads.col.now'), cell: ({ tariffId }) => names.get(tariffId ?? '') ?? t('pads.before') },
          { head: t('pads.col.zone'), cell: ({ zone }) => zone.replaceAll('_', ' ') },
          {
            head: t('tariffs.col.acts'),
            cell: (pad) => (
              <Button aria-label={t('pads.changeNamed', { name: pad.padName })} onClick={() => onPick(pad)}>
                {t('pads.change')}
              </Button>
            ),
          },
        ]}
      />
      {pads.length < count ? <p className="text-13">{t('pads.more', { shown: String(pads.length), count })}</p> : null}
    </>
  );
}

function FindPad({ onPick }: { readonly onPick: (pad: Picked) => void }) {
  const [q, setQ] = useState('');
  const found = useQuery(tariffQueries.findPads(q));
  const pads = [...new Map((found.data?.items ?? []).map((pump) => [pump.padId, pump])).values()];
  return (
    <div className="flex flex-col gap-2">
      <span className="flex flex-wrap items-center gap-2 text-ink-2">
        {t('pads.find')}
        <SearchField value={q} onSearch={setQ} />
      </span>
      {q.trim() === '' ? null : found.isError ? (
        <ErrorNotice error={found.error} onRetry={() => void found.refetch()} />
      ) : (
        <ul className="flex flex-wrap gap-2" aria-label={t('pads.find')}>
          {pads.map(({ padId, padName }) => (
            <li key={padId}>
              <Button
                onClick={() => {
                  setQ('');
                  onPick({ padId, padName });
                }}
              >
                {padName}
              </Button>
            </li>
          ))}
          {found.data !== undefined && pads.length === 0 ? <li className="text-ink-2">{t('pads.find.none')}</li> : null}
        </ul>
      )}
    </div>
  );
}
