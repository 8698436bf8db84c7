import { Link, useSearchParams } from 'react-router-dom';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { changeSearch } from '#src/lib/read-search.ts';
import { ENERGY_USUAL } from './energy-address.ts';
import { type MonthText, nameOfMonth, shiftMonth } from './local-month.ts';

export type MonthNavProps = {
  readonly month: MonthText;
  readonly present: MonthText;
  /** What is shown when no month is asked for; without it the present one. */
  readonly usual?: MonthText;
  /** The first there is anything of; undefined = not known. */
  readonly first?: MonthText | undefined;
};

const LINK = 'inline-flex min-h-8 items-center rounded-control border border-rule-strong bg-sheet px-2.5 hover:bg-wash';

/** A month earlier, a month later; the usual one stands in no address. */
export function MonthNav({ month, present, usual = present, first }: MonthNavProps) {
  const format = useFormat();
  const [search] = useSearchParams();
  const name = (each: MonthText) => nameOfMonth(each, format.locale, 'short');
  const to = (each: MonthText) => ({
    search: `${changeSearch(search, { month: each === usual ? undefined : each }, ENERGY_USUAL)}`,
  });
  const [earlier, later] = [shiftMonth(month, -1), shiftMonth(month, 1)];
  return (
    <nav aria-label={t('energy.month.which')} data-print="never" className="flex flex-wrap gap-1.5">
      {first === undefined || earlier >= first ? (
        <Link to={to(earlier)} preventScrollReset className={LINK}>
          {t('energy.month.earlier', { month: name(earlier) })}
        </Link>
      ) : null}
      {later <= present ? (
        <Link to={to(later)} preventScrollReset className={LINK}>
          {t(later === present ? 'energy.month.present' : 'energy.month.later', { month: name(later) })}
        </Link>
      ) : null}
    </nav>
  );
}
