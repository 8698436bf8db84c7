import { useEffect, useState } from 'react';
import { formatSpan } from '#src/lib/format/format-span.ts';
import { t } from '#src/lib/messages/t.ts';

/** Counts down to the moment at which the server takes another try. */
export function ThrottleNotice({ seconds }: { readonly seconds: number }) {
  const [left, setLeft] = useState(seconds);
  useEffect(() => {
    const end = Date.now() + seconds * 1000;
    const timer = setInterval(() => setLeft(Math.max(0, Math.ceil((end - Date.now()) / 1000))), 500);
    return () => clearInterval(timer);
  }, [seconds]);
  return left === 0 ? t('signIn.throttledOver') : t('signIn.throttled', { wait: formatSpan(left * 1000) });
}
