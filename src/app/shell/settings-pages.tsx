import { NavLink } from 'react-router-dom';
import { chipClass } from '#src/components/ui/chip.tsx';
import { t } from '#src/lib/messages/t.ts';
import { paths } from '#src/lib/paths.ts';

const PAGES = [
  { to: paths.rules(), label: 'shell.rules' },
  { to: paths.tariffs(), label: 'shell.tariffs' },
] as const;

/** The pages of the settings, side by side. */
export function SettingsPages() {
  return (
    <nav aria-label={t('shell.settings')} className="flex flex-wrap gap-2">
      {PAGES.map(({ to, label }) => (
        <NavLink key={to} to={to} className={({ isActive }) => chipClass(isActive)}>
          {t(label)}
        </NavLink>
      ))}
    </nav>
  );
}
