import { useEffect, useRef } from 'react';
import { useLocation, useNavigationType } from 'react-router-dom';

/** Whether nothing on the page has the focus: the browser gives it to the body when what had it is gone. */
const isFocusFree = () => document.activeElement === null || document.activeElement === document.body;

function focusHeading(): HTMLElement | null {
  const heading = document.querySelector<HTMLElement>('main h1');
  heading?.focus({ preventScroll: true });
  return heading;
}

/**
 * Moves the focus to the heading of a page that was navigated to, so that a screen reader says where one is now. A page
 * may put another heading in its place when its data have come: the focus goes with it, unless it is elsewhere by then.
 */
export function useHeadingFocus(): void {
  const { pathname } = useLocation();
  // A page that was loaded anew begins at its top, as pages do; one that was come to by signing in was navigated to.
  const loadedAt = useRef(useNavigationType() === 'POP' ? pathname : undefined);
  useEffect(() => {
    const main = document.querySelector('main');
    if (main === null || loadedAt.current === pathname) return;
    loadedAt.current = undefined;
    let heading = focusHeading();
    const observer = new MutationObserver(() => {
      if (heading?.isConnected !== true && isFocusFree()) heading = focusHeading();
    });
    observer.observe(main, { childList: true, subtree: true });
    return () => observer.disconnect();
  }, [pathname]);
}
