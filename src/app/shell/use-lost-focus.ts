import { useEffect, useRef } from 'react';

/**
 * Calls back when what had the focus has gone from the page and nothing else took it: a row that left its list, a button
 * that did its work. A click beside everything is no such loss.
 */
export function useLostFocus(onLost: () => void): void {
  const called = useRef(onLost);
  useEffect(() => {
    called.current = onLost;
  });
  useEffect(() => {
    let last: Element | null = document.activeElement;
    const follow = () => {
      last = document.activeElement;
    };
    const observer = new MutationObserver(() => {
      if (last === null || last.isConnected || document.activeElement !== document.body) return;
      last = null;
      called.current();
    });
    document.addEventListener('focusin', follow);
    observer.observe(document.body, { childList: true, subtree: true });
    return () => {
      document.removeEventListener('focusin', follow);
      observer.disconnect();
    };
  }, []);
}
