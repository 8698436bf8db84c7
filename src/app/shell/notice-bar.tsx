import { useEffect } from 'react';
import { Button } from '#src/components/ui/button.tsx';
import { useStore } from '#src/hooks/use-store.ts';
import { t } from '#src/lib/messages/t.ts';
import { closeNotice, noticeStore } from '#src/lib/notices.ts';

/** Long enough to read and to reach the button with a keyboard. */
const SHOWN_MS = 20_000;

/** What was just done, and the way back from it. */
export function NoticeBar() {
  const notice = useStore(noticeStore);
  useEffect(() => {
    if (notice === undefined) return;
    const timer = setTimeout(() => noticeStore.get()?.id === notice.id && closeNotice(), SHOWN_MS);
    return () => clearTimeout(timer);
  }, [notice]);
  return (
    <div role="status" data-print="never" className="fixed inset-x-0 bottom-0 z-30 flex justify-center">
      {notice === undefined ? null : (
        <div
          className={`m-3 flex max-w-2xl flex-wrap items-center gap-x-4 gap-y-2 border bg-sheet px-4 py-2.5 ${notice.trouble === true ? 'border-p1 text-p1' : 'border-ink'}`}
        >
          <span>{notice.text}</span>
          {notice.action === undefined ? null : (
            <Button
              aria-label={notice.action.name}
              onClick={() => {
                closeNotice();
                notice.action?.run();
              }}
            >
              {notice.action.label}
            </Button>
          )}
          <Button look="quiet" onClick={closeNotice}>
            {t('strip.close')}
          </Button>
        </div>
      )}
    </div>
  );
}
