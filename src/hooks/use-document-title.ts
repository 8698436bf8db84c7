import { useEffect } from 'react';
import { t } from '#src/lib/messages/t.ts';

/** Names the tab after the page. */
export function useDocumentTitle(title: string): void {
  useEffect(() => {
    document.title = t('shell.documentTitle', { page: title });
  }, [title]);
}
