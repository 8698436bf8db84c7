import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { Outlet, ScrollRestoration, useNavigation } from 'react-router-dom';
import { sessionQuery } from '#src/features/session/session-queries.ts';
import { FormatContext } from '#src/hooks/use-format.ts';
import { SessionContext } from '#src/hooks/use-session.ts';
import { useStore } from '#src/hooks/use-store.ts';
import { createFormat } from '#src/lib/format/create-format.ts';
import { liveLink } from '#src/lib/live/live-link.ts';
import { t } from '#src/lib/messages/t.ts';
import { AlarmAnnouncer } from './alarm-announcer.tsx';
import { Header } from './header.tsx';
import { NoticeBar } from './notice-bar.tsx';
import { OfflineBanner } from './offline-banner.tsx';
import { useHeadingFocus } from './use-heading-focus.ts';
import { useLive } from './use-live.ts';
import { useSessionRenewal } from './use-session-renewal.ts';

/** The frame around every page behind the sign-in: header, live connection, how this person reads figures. */
export function Shell() {
  const { data: session } = useQuery(sessionQuery());
  const { phase } = useStore(liveLink);
  const { state } = useNavigation();
  const preferences = session?.preferences;
  const format = useMemo(
    () => createFormat({ locale: navigator.language, preferences: preferences ?? { units: 'us', clock: 'locale' } }),
    [preferences],
  );
  useLive();
  useSessionRenewal(session?.accessUntil);
  useHeadingFocus();
  if (session === undefined) return null;
  return (
    <SessionContext value={session}>
      <FormatContext value={format}>
        <a
          href="#page"
          className="sr-only focus:not-sr-only focus:absolute focus:z-20 focus:bg-ink focus:p-3 focus:text-sheet"
        >
          {t('shell.skip')}
        </a>
        <Header />
        <OfflineBanner />
        <main id="page" tabIndex={-1} data-link={phase} aria-busy={state === 'loading'} className="outline-none">
          <Outlet />
        </main>
        <NoticeBar />
        <AlarmAnnouncer />
        <ScrollRestoration />
      </FormatContext>
    </SessionContext>
  );
}
