import type { PumpDetail } from '#shared/contract/http/pumps.ts';
import type { StripState } from '#src/components/charts/strip/strip-run.ts';
import type { CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { DayNav } from './day-nav.tsx';
import { PumpDay } from './pump-day.tsx';
import type { ShownDay } from './use-day.ts';

export type DaySheetProps = {
  readonly pump: PumpDetail;
  readonly strip: StripState;
  readonly day: ShownDay;
  readonly now: number;
  readonly cursor: CursorStore;
};

/** The day of one pump, large, for those who look after it. */
export function DaySheet({ pump, strip, day, now, cursor }: DaySheetProps) {
  const format = useFormat();
  const title = day.isToday
    ? `${t('pump.day.today')}, ${format.day(day.from, pump.zone)}`
    : format.dayWithYear(day.from, pump.zone);
  return (
    <Sheet id="day" title={title} aside={<DayNav day={day} visibleFrom={pump.visibleFrom} />}>
      <PumpDay pump={pump} strip={strip} day={day} now={now} cursor={cursor} size="day" voice="technician" />
    </Sheet>
  );
}
