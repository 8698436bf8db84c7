import type { Preferences } from '#shared/contract/http/session.ts';
import { Choice } from '#src/components/ui/choice.tsx';
import { describeError } from '#src/lib/api/describe-error.ts';
import { t } from '#src/lib/messages/page-words.ts';
import { useUpdatePreferences } from './use-update-preferences.ts';

/** Units, theme and clock. Each choice is kept as soon as it is made. */
export function PreferencesForm({ preferences }: { readonly preferences: Preferences }) {
  const update = useUpdatePreferences();
  return (
    <div className="grid gap-6 px-5 py-5 sm:grid-cols-3">
      <Choice
        legend={t('profile.units')}
        value={preferences.units}
        onChange={(units) => update.mutate({ units })}
        options={[
          { value: 'us', label: t('profile.units.us'), hint: t('profile.units.us.hint') },
          { value: 'si', label: t('profile.units.si'), hint: t('profile.units.si.hint') },
        ]}
      />
      <Choice
        legend={t('profile.theme')}
        value={preferences.theme}
        onChange={(theme) => update.mutate({ theme })}
        options={[
          { value: 'system', label: t('profile.theme.system') },
          { value: 'light', label: t('profile.theme.light') },
          { value: 'dark', label: t('profile.theme.dark') },
        ]}
      />
      <Choice
        legend={t('profile.clock')}
        value={preferences.clock}
        onChange={(clock) => update.mutate({ clock })}
        options={[
          { value: 'locale', label: t('profile.clock.locale') },
          { value: '12', label: t('profile.clock.12') },
          { value: '24', label: t('profile.clock.24') },
        ]}
      />
      <p role="status" className="min-h-5 text-13 text-ink-2 sm:col-span-3">
        {update.isSuccess ? t('profile.saved') : null}
        {update.isError ? t('profile.notSaved', { reason: describeError(update.error).title }) : null}
      </p>
    </div>
  );
}
