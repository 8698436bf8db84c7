import { useFormat } from '#src/hooks/use-format.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { useStore } from '#src/hooks/use-store.ts';
import { liveLink } from '#src/lib/live/live-link.ts';
import { t } from '#src/lib/messages/t.ts';
import { asServerTime } from '#src/lib/server-clock.ts';

/** Says that the picture stands still, since when, and that nothing needs to be done. */
export function OfflineBanner() {
  const { phase, heardAt } = useStore(liveLink);
  const format = useFormat();
  const { company } = useSession();
  if (phase !== 'offline' && phase !== 'broken') return null;
  return (
    <p role="status" data-print="never" className="border-b border-p2 bg-p2-ground px-4 py-2 text-p2 sm:px-7">
      <strong className="font-semibold">{t('offline.title')}</strong>{' '}
      {heardAt === undefined
        ? t('offline.never')
        : t('offline.detail', { time: format.time(asServerTime(heardAt), company.zone) })}
    </p>
  );
}
