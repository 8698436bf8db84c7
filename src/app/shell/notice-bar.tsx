import { type FocusEvent, type RefObject, useEffect, useRef, useState } from 'react';
import { Button } from '#src/components/ui/button.tsx';
import { useStore } from '#src/hooks/use-store.ts';
import { t } from '#src/lib/messages/t.ts';
import { closeNotice, noticeStore, type PageNotice } from '#src/lib/notices.ts';
import { useLostFocus } from './use-lost-focus.ts';

/** Long enough to read and to reach the button. */
const SHOWN_MS = 20_000;

const focusHeading = () => document.querySelector<HTMLElement>('main h1')?.focus({ preventScroll: true });

/**
 * What was just done, and the way back from it. What was done often takes its button away: the focus that is left without
 * a place goes here, one Tab before the way back.
 */
export function NoticeBar() {
  const notice = useStore(noticeStore);
  const box = useRef<HTMLDivElement>(null);
  const isHomeless = useRef(false);
  useLostFocus(() => {
    isHomeless.current = box.current === null;
    box.current?.focus();
  });
  useEffect(() => {
    // The button may be gone before the server has answered and there is something to tell.
    if (notice === undefined || !isHomeless.current) return;
    isHomeless.current = false;
    if (document.activeElement === document.body) box.current?.focus();
  }, [notice]);
  return (
    <div role="status" data-print="never" className="fixed inset-x-0 bottom-0 z-30 flex justify-center">
      {notice === undefined ? null : <ShownNotice key={notice.id} box={box} notice={notice} />}
    </div>
  );
}

type ShownNoticeProps = { readonly box: RefObject<HTMLDivElement | null>; readonly notice: PageNotice };

/** One notice. It waits while the pointer is on it, or the focus of a keyboard. */
function ShownNotice({ box, notice }: ShownNoticeProps) {
  const [held, setHeld] = useState(false);
  useEffect(() => {
    if (held) return;
    const timer = setTimeout(closeNotice, SHOWN_MS);
    return () => clearTimeout(timer);
  }, [held]);
  const close = () => {
    const hadFocus = box.current?.contains(document.activeElement) === true;
    closeNotice();
    if (hadFocus) focusHeading();
  };
  const holdForKeyboard = ({ target }: FocusEvent) => setHeld(target.matches(':focus-visible'));
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: it only waits while somebody is at it; its buttons do the work.
    <div
      ref={box}
      tabIndex={-1}
      onPointerEnter={() => setHeld(true)}
      onPointerLeave={() => setHeld(false)}
      onFocus={holdForKeyboard}
      onBlur={() => setHeld(false)}
      className={`m-3 flex max-w-2xl flex-wrap items-center gap-x-4 gap-y-2 border bg-sheet px-4 py-2.5 ${notice.trouble === true ? 'border-p1 text-p1' : 'border-ink'}`}
    >
      <span>{notice.text}</span>
      {notice.action === undefined ? null : (
        <Button
          aria-label={notice.action.name}
          onClick={() => {
            close();
            notice.action?.run();
          }}
        >
          {notice.action.label}
        </Button>
      )}
      <Button look="quiet" onClick={close}>
        {t('strip.close')}
      </Button>
    </div>
  );
}
