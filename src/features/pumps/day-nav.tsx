import { Link } from 'react-router-dom';
import { chipClass } from '#src/components/ui/chip.tsx';
import { t } from '#src/lib/messages/page-words.ts';
import { dayQuery, type ShownDay } from './use-day.ts';

export type DayNavProps = {
  readonly day: ShownDay;
  /** Nothing from before this instant may be seen. */
  readonly visibleFrom: number;
};

/** The day before, the day after, today. */
export function DayNav({ day, visibleFrom }: DayNavProps) {
  const to = (epochDay: number | undefined) => ({ search: dayQuery(epochDay) });
  return (
    <nav aria-label={t('pump.day.label')} data-print="never" className="flex flex-wrap gap-2">
      {day.from > visibleFrom ? (
        <Link to={to(day.epochDay - 1)} preventScrollReset className={chipClass(false)}>
          {t('pump.day.earlier')}
        </Link>
      ) : null}
      {day.isToday ? null : (
        <>
          <Link to={to(day.epochDay + 1)} preventScrollReset className={chipClass(false)}>
            {t('pump.day.later')}
          </Link>
          <Link to={to(undefined)} preventScrollReset className={chipClass(false)}>
            {t('pump.day.now')}
          </Link>
        </>
      )}
    </nav>
  );
}
