import type { PumpRow } from '#shared/contract/http/pumps.ts';
import { alarmWords } from '#shared/domain/wording/alarm-words.ts';
import type { Format } from '#src/lib/format/create-format.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { whatComes } from '#src/lib/why/what-comes.ts';
import { whyNow } from '#src/lib/why/why.ts';
import { conditionOf } from './pump-heading.ts';

/** What a homeowner reads first: one fact, what it means, and whether somebody should be called. */
export type HomeView = { readonly heading: string; readonly lead: readonly string[]; readonly trouble: boolean };

type Company = { readonly name: string };

const describeCondition = (pump: PumpRow & { now: NonNullable<PumpRow['now']> }, format: Format): string => {
  const rpm = format.rpm(pump.now.rpm);
  const condition = conditionOf(pump.now);
  if (condition === 'running') return t('home.heading.running', { rpm });
  if (condition === 'off') return t('home.heading.off', { rpm, expected: format.rpm(pump.now.expectedRpm) });
  return t(`home.heading.${condition}`);
};

/** Notes are our own work list: they do not trouble the homeowner's heading. */
const troubleOf = ({ alarm }: PumpRow) => (alarm === null || alarm.priority === 'note' ? undefined : alarm);

export function viewHome(pump: PumpRow, company: Company, format: Format, now: number): HomeView {
  const told = t('home.told', { company: company.name });
  if (pump.silentSince !== null) {
    const time = format.moment(pump.heardAt ?? pump.silentSince, pump.zone, now);
    return { heading: t('home.heading.silent'), lead: [t('home.silent.detail', { time }), told], trouble: false };
  }
  if (pump.now === null) return { heading: t('home.heading.never'), lead: [t('home.never.detail')], trouble: false };
  const known = { ...pump, now: pump.now };
  const why = whyNow(pump.now, pump, format, 'homeowner');
  const trouble = troubleOf(pump);
  if (trouble !== undefined) {
    const { homeowner } = alarmWords(trouble.detector, trouble.cause, trouble.evidence);
    return { heading: homeowner, lead: [why, told], trouble: true };
  }
  const next = whatComes(pump, now, format);
  return { heading: describeCondition(known, format), lead: next === undefined ? [why] : [why, next], trouble: false };
}
