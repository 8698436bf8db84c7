import { useEffect } from 'react';
import { isRouteErrorResponse, Link, useLocation, useRouteError } from 'react-router-dom';
import { Button, buttonClass } from '#src/components/ui/button.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { useStore } from '#src/hooks/use-store.ts';
import { isApiError } from '#src/lib/api/api-error.ts';
import { describeError, isMissingCode } from '#src/lib/api/describe-error.ts';
import { liveLink } from '#src/lib/live/live-link.ts';
import { t } from '#src/lib/messages/t.ts';
import { paths } from '#src/lib/paths.ts';
import { NotFoundPage } from './not-found-page.tsx';

/** A page whose code or data did not come because the server was away comes by itself when the server is back. */
function useComeBack(error: unknown): void {
  const { phase } = useStore(liveLink);
  const waits = isApiError(error, 'unreachable') || isMissingCode(error);
  useEffect(() => {
    // The link was down when the page failed: this is its return, not the state it had all along.
    if (!waits || phase === 'live') return;
    return liveLink.subscribe(() => liveLink.get().phase === 'live' && location.reload());
  }, [waits, phase]);
}

/** Where every error ends that no part of a page has caught: what went wrong, what to do, and a way on. */
export function ErrorPage() {
  const error = useRouteError();
  const { pathname } = useLocation();
  useComeBack(error);
  if (isRouteErrorResponse(error) && error.status === 404) return <NotFoundPage />;
  const { title, detail, requestId } = describeError(error);
  // Loading a page that is for others again would change nothing: the way on is another page.
  const isForOthers = isApiError(error, 'forbidden');
  return (
    <div className="px-4 py-8 sm:px-7">
      <PageHeading title={isForOthers ? title : t('error.page')}>{title}</PageHeading>
      <p role="alert" className="mt-2 max-w-prose text-ink-2">
        {detail}
      </p>
      {requestId === undefined ? null : <p className="text-13 text-ink-2">{t('error.request', { id: requestId })}</p>}
      <div className="mt-4 flex flex-wrap gap-3">
        {isForOthers ? null : (
          <Button look="main" onClick={() => location.reload()}>
            {t('error.reload')}
          </Button>
        )}
        {pathname === paths.first() ? null : (
          <Link to={paths.first()} className={buttonClass(isForOthers ? 'main' : 'quiet')}>
            {t('error.home')}
          </Link>
        )}
      </div>
    </div>
  );
}
