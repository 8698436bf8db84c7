import { useEffect, useRef } from 'react';
import { useLocation } from 'react-router-dom';

/** Moves the focus to the heading of a page that was navigated to, so that a screen reader says where one is now. */
export function useHeadingFocus(): void {
  const { pathname } = useLocation();
  const before = useRef(pathname);
  useEffect(() => {
    if (before.current === pathname) return;
    before.current = pathname;
    document.querySelector<HTMLElement>('main h1')?.focus({ preventScroll: true });
  }, [pathname]);
}
