import { useNavigate, useSearchParams } from 'react-router-dom';
import { DayTrace } from '#src/components/ui/day-trace.tsx';
import { Mark } from '#src/components/ui/mark.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { SignInForm } from '#src/features/session/sign-in-form.tsx';
import { t } from '#src/lib/messages/t.ts';
import { readReturnPath } from '#src/lib/return-path.ts';

/** The door. A link that was asked for before is where one goes on to. */
export function SignInPage() {
  const navigate = useNavigate();
  const [search] = useSearchParams();
  const to = readReturnPath(search.get('to'));
  return (
    <main className="grid min-h-dvh place-items-center px-4 py-10">
      <div className="w-full max-w-md">
        <div className="mb-6 flex items-center gap-3">
          <Mark size={40} />
          <span className="figures text-27 font-semibold tracking-[-0.02em]">{t('shell.wordmark')}</span>
        </div>
        <div className="border border-ink bg-sheet">
          <DayTrace />
          <div className="px-5 py-6 sm:px-7">
            <PageHeading title={t('signIn.page')}>{t('signIn.heading')}</PageHeading>
            <p className="mt-1 mb-6 text-ink-2">{to === '/' ? null : t('signIn.returning')}</p>
            <SignInForm onSignedIn={() => void navigate(to, { replace: true })} />
          </div>
        </div>
        <p className="mt-4 text-13 text-ink-2">{t('signIn.watches')}</p>
      </div>
    </main>
  );
}
