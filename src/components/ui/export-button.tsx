import { useState } from 'react';
import { saveCsv } from '#src/lib/csv/save-csv.ts';
import type { CsvValue } from '#src/lib/csv/write-csv.ts';
import { t } from '#src/lib/messages/t.ts';
import { Button } from './button.tsx';

export type ExportButtonProps = {
  /** Of the file, without its ending. */
  readonly name: string;
  /** The head and every row, gathered when somebody asks: a long list may have to be read first. */
  readonly rows: () => readonly (readonly CsvValue[])[] | Promise<readonly (readonly CsvValue[])[]>;
};

/** Saves a table as a file that a spreadsheet opens. */
export function ExportButton({ name, rows }: ExportButtonProps) {
  const [state, setState] = useState<'ready' | 'busy' | 'failed'>('ready');
  const save = async () => {
    setState('busy');
    try {
      saveCsv(name, await rows());
      setState('ready');
    } catch {
      setState('failed');
    }
  };
  return (
    <span data-print="never" className="inline-flex flex-wrap items-center gap-2">
      <Button disabled={state === 'busy'} onClick={() => void save()}>
        {state === 'busy' ? t('export.busy') : t('export.csv')}
      </Button>
      {state === 'failed' ? (
        <span role="alert" className="text-p1">
          {t('export.failed')}
        </span>
      ) : null}
    </span>
  );
}
