import { Link } from 'react-router-dom';
import { buttonClass } from '#src/components/ui/button.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { t } from '#src/lib/messages/t.ts';
import { paths } from '#src/lib/paths.ts';
import { type FleetView, isNarrowed } from './fleet-address.ts';

/** Nothing on the wall: either nothing matches, or there is nothing yet. */
export function FleetEmpty({ view }: { readonly view: FleetView }) {
  const narrowed = isNarrowed(view);
  return (
    <div className="border border-ink bg-sheet">
      <Notice
        title={narrowed ? t('fleet.noMatch') : t('fleet.empty')}
        actions={
          narrowed ? (
            <Link to={paths.fleet()} className={buttonClass()}>
              {t('fleet.clear')}
            </Link>
          ) : undefined
        }
      >
        <p>{narrowed ? t('fleet.noMatch.detail') : t('fleet.empty.detail')}</p>
      </Notice>
    </div>
  );
}
