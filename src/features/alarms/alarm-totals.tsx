import type { AlarmPage } from '#shared/contract/http/alarms.ts';
import { Figures } from '#src/components/ui/figures.tsx';
import { t } from '#src/lib/messages/page-words.ts';

/** Alarms by priority, and notes apart from them: nothing is said of what there is none of. */
export function AlarmTotals({ totals: { urgent, soon, note } }: { readonly totals: AlarmPage['totals'] }) {
  const parts = [
    { count: urgent, tone: 'text-p1', words: t('alarms.totals.urgent', { count: urgent }) },
    { count: soon, tone: 'text-p2', words: t('alarms.totals.soon', { count: soon }) },
    { count: note, tone: 'text-p3', words: t('alarms.totals.notes', { count: note }) },
  ].filter(({ count }) => count > 0);
  if (parts.length === 0) return null;
  return (
    <ul className="flex flex-wrap gap-x-4">
      {parts.map(({ tone, words }) => (
        <li key={tone} className={tone}>
          <Figures text={words} />
        </li>
      ))}
    </ul>
  );
}
