import { useNavigate } from 'react-router-dom';
import { Button } from '#src/components/ui/button.tsx';
import { FactList } from '#src/components/ui/fact-list.tsx';
import { PageHeading } from '#src/components/ui/page-heading.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { PreferencesForm } from '#src/features/session/preferences-form.tsx';
import { useSignOut } from '#src/features/session/use-sign-out.ts';
import { useFormat } from '#src/hooks/use-format.ts';
import { useNow } from '#src/hooks/use-now.ts';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { paths } from '#src/lib/paths.ts';

/** An example of a temperature that both units show differently, °C. */
const EXAMPLE_CELSIUS = 4.4;

/** Who one is here, and how one reads Millrace. */
export function ProfilePage() {
  const { user, company, preferences } = useSession();
  const navigate = useNavigate();
  const format = useFormat();
  const now = useNow(1000);
  const signOut = useSignOut(() => void navigate(paths.signIn(), { replace: true }));
  const facts = [
    [t('profile.email'), user.email],
    [t('profile.role'), t(`profile.role.${user.role}`)],
    [t('profile.company'), company.name],
  ] as const;
  const example = t('profile.example', {
    time: format.time(now, company.zone),
    temperature: format.quantity(EXAMPLE_CELSIUS, 'temperature'),
  });
  return (
    <div className="mx-auto flex max-w-4xl flex-col gap-5 px-4 py-6 sm:px-7">
      <PageHeading title={t('profile.page')}>{user.name}</PageHeading>
      <Sheet>
        <div className="px-5 py-4">
          <FactList facts={facts} />
        </div>
      </Sheet>
      <Sheet
        id="preferences"
        title={t('profile.preferences')}
        aside={<span className="figures text-13 text-ink-2">{example}</span>}
      >
        <PreferencesForm preferences={preferences} />
      </Sheet>
      <div>
        <Button onClick={() => signOut.mutate()} disabled={signOut.isPending}>
          {t('profile.signOut')}
        </Button>
      </div>
    </div>
  );
}
