import { Link, useSearchParams } from 'react-router-dom';
import { chipClass } from '#src/components/ui/chip.tsx';
import { t } from '#src/lib/messages/t.ts';
import { changeFleetAddress, type FleetChange, type FleetRange } from './fleet-address.ts';
import type { WallWindow } from './wall-window.ts';

const RANGES: readonly FleetRange[] = ['24h', '7d'];

/** How much time the wall shows, and which: a day or a week, earlier, later, back to now. */
export function TimeTravel({ range, window }: { readonly range: FleetRange; readonly window: WallWindow }) {
  const [search] = useSearchParams();
  const to = (change: FleetChange) => ({ search: changeFleetAddress(search, change).toString() });
  return (
    <nav aria-label={t('fleet.range')} className="flex flex-wrap items-center gap-2">
      {RANGES.map((each) => (
        <Link
          key={each}
          to={to({ range: each })}
          preventScrollReset
          aria-current={each === range ? 'true' : undefined}
          className={`figures ${chipClass(each === range)}`}
        >
          {t(`fleet.range.${each}`)}
        </Link>
      ))}
      <Link to={to({ day: window.earlier })} preventScrollReset className={chipClass(false)}>
        {t('fleet.earlier')}
      </Link>
      {window.live ? null : (
        <Link to={to({ day: window.later })} preventScrollReset className={chipClass(false)}>
          {window.later === undefined ? t('fleet.live') : t('fleet.later')}
        </Link>
      )}
    </nav>
  );
}
