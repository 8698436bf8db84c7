import { Figures } from '#src/components/ui/figures.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import type { LatelyEvent } from './lately-view.ts';

export type LatelyListProps = {
  /** Undefined until they have come. */
  readonly events: readonly LatelyEvent[] | undefined;
  readonly zone: string;
  readonly now: number;
};

const MOST = 8;

/** What happened lately, the latest first. */
export function LatelyList({ events, zone, now }: LatelyListProps) {
  const format = useFormat();
  return (
    <Sheet id="lately" title={t('home.lately')}>
      <ol aria-busy={events === undefined} className="px-4 sm:px-5">
        {events === undefined ? <li className="py-3 text-ink-2">{t('home.lately.loading')}</li> : null}
        {events?.length === 0 ? <li className="py-3 text-ink-2">{t('home.lately.none')}</li> : null}
        {events?.slice(0, MOST).map(({ at, text }) => (
          <li
            key={`${at} ${text}`}
            className="grid gap-x-4 border-t border-rule py-2.5 first:border-0 sm:grid-cols-[10rem_minmax(0,1fr)]"
          >
            <span className="figures">{format.dayAndTime(at, zone, now, t('pump.day.today'))}</span>
            <span>
              <Figures text={text} />
            </span>
          </li>
        ))}
      </ol>
    </Sheet>
  );
}
