import { Link } from 'react-router-dom';
import { buttonClass } from '#src/components/ui/button.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { t } from '#src/lib/messages/t.ts';
import { paths } from '#src/lib/paths.ts';

/** An address that leads nowhere. */
export function NotFoundPage() {
  return (
    <div className="px-4 py-8 sm:px-7">
      <PageHeading title={t('notFound.page')} />
      <p className="mt-2 mb-4 text-ink-2">{t('notFound.detail')}</p>
      <Link to={paths.first()} className={buttonClass('main')}>
        {t('error.home')}
      </Link>
    </div>
  );
}
