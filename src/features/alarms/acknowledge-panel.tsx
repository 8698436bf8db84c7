import { useId, useState } from 'react';
import type { Alarm } from '#shared/contract/http/alarms.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { AcknowledgeButton } from './acknowledge-button.tsx';
import { isWaiting } from './alarm-view.ts';

const LONGEST_NOTE = 500;

/** The alarm page's one button, with room for a note that goes with it. */
export function AcknowledgePanel({ alarm }: { readonly alarm: Alarm }) {
  const [note, setNote] = useState('');
  const id = useId();
  return (
    <div data-print="never" className="flex flex-col gap-2">
      <AcknowledgeButton alarm={alarm} note={note} touch />
      {isWaiting(alarm) ? (
        <details>
          <summary className="inline-flex min-h-8 items-center text-ink-2 underline underline-offset-2">
            {t('alarm.note')}
          </summary>
          <label htmlFor={id} className="sr-only">
            {t('alarm.note')}
          </label>
          <textarea
            id={id}
            rows={2}
            maxLength={LONGEST_NOTE}
            value={note}
            onChange={(event) => setNote(event.target.value)}
            aria-describedby={`${id}-hint`}
            className="mt-1 w-full rounded-control border border-ink-2 bg-sheet px-3 py-2 text-17"
          />
          <p id={`${id}-hint`} className="text-13 text-ink-2">
            {t('alarm.note.hint')}
          </p>
        </details>
      ) : null}
    </div>
  );
}
