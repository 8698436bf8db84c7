import { isRouteErrorResponse, Link, useLocation, useRouteError } from 'react-router-dom';
import { buttonClass } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { isApiError } from '#src/lib/api/api-error.ts';
import { describeError } from '#src/lib/api/describe-error.ts';
import { t } from '#src/lib/messages/t.ts';
import { paths } from '#src/lib/paths.ts';
import { NotFoundPage } from './not-found-page.tsx';

/** Where every error ends that no part of a page has caught: what went wrong, and a way on. */
export function ErrorPage() {
  const error = useRouteError();
  const { pathname } = useLocation();
  if (isRouteErrorResponse(error) && error.status === 404) return <NotFoundPage />;
  const { title, detail } = describeError(error);
  // Loading it again would change nothing: the way on is another page.
  if (isApiError(error, 'forbidden'))
    return (
      <div className="px-4 py-8 sm:px-7">
        <PageHeading title={title} />
        <p className="mt-2 max-w-prose text-ink-2">{detail}</p>
        <Link to={paths.first()} className={`mt-4 ${buttonClass('main')}`}>
          {t('error.home')}
        </Link>
      </div>
    );
  return (
    <div className="px-4 py-8 sm:px-7">
      <PageHeading title={t('error.page')}>{title}</PageHeading>
      <div className="mt-5 border border-ink bg-sheet">
        <ErrorNotice error={error} />
      </div>
      {pathname === paths.first() ? null : (
        <Link to={paths.first()} className={`mt-4 ${buttonClass('quiet')}`}>
          {t('error.home')}
        </Link>
      )}
    </div>
  );
}
