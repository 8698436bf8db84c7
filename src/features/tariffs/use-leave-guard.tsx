import { type ReactNode, useEffect } from 'react';
import { useBlocker } from 'react-router-dom';
import { Button } from '#src/components/ui/button.tsx';
import { Dialog } from '#src/components/ui/dialog.tsx';
import { t } from '#src/lib/messages/tariffs-words.ts';

/** Holds whoever leaves with unsaved changes; answers what to show then. `isLeaving` lets the page's own steps pass. */
export function useLeaveGuard(hasChanges: boolean, isLeaving: () => boolean): ReactNode {
  const blocker = useBlocker(
    ({ currentLocation, nextLocation }) =>
      hasChanges && !isLeaving() && currentLocation.pathname !== nextLocation.pathname,
  );
  useEffect(() => {
    if (!hasChanges) return;
    const hold = (event: BeforeUnloadEvent) => event.preventDefault();
    addEventListener('beforeunload', hold);
    return () => removeEventListener('beforeunload', hold);
  }, [hasChanges]);
  if (blocker.state !== 'blocked') return null;
  return (
    <Dialog title={t('guard.title')} onClose={() => blocker.reset()}>
      <div className="flex flex-col gap-4">
        <p>{t('guard.text')}</p>
        <div className="flex flex-wrap gap-2">
          <Button look="main" onClick={() => blocker.reset()}>
            {t('guard.stay')}
          </Button>
          <Button onClick={() => blocker.proceed()}>{t('guard.leave')}</Button>
        </div>
      </div>
    </Dialog>
  );
}
