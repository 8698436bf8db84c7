import type { PumpRow } from '#shared/contract/http/pumps.ts';
import type { StripState } from '#src/components/charts/strip/strip-run.ts';
import type { CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { DayNav } from './day-nav.tsx';
import { PumpDay } from './pump-day.tsx';
import type { ShownDay } from './use-day.ts';

export type HomeStripProps = {
  readonly pump: PumpRow;
  readonly strip: StripState;
  readonly day: ShownDay;
  readonly visibleFrom: number;
  readonly now: number;
  readonly cursor: CursorStore;
};

/** The homeowner's strip: what ran when, named by what it does for them. */
export function HomeStrip({ pump, strip, day, visibleFrom, now, cursor }: HomeStripProps) {
  const format = useFormat();
  const date = format.day(day.from, pump.zone);
  return (
    <Sheet
      id="day"
      title={day.isToday ? t('home.today', { pad: pump.padName }) : t('home.day', { day: date, pad: pump.padName })}
      aside={
        <span className="flex flex-wrap items-center gap-3">
          <DayNav day={day} visibleFrom={visibleFrom} />
          <span className="figures text-ink-2">{date}</span>
        </span>
      }
    >
      <PumpDay
        pump={pump}
        strip={strip}
        day={day}
        now={now}
        cursor={cursor}
        size="home"
        voice="homeowner"
        idle={t('home.strip.hint')}
      />
    </Sheet>
  );
}
