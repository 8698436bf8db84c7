import { Link, NavLink } from 'react-router-dom';
import { Mark } from '#src/components/ui/mark.tsx';
import { useSession } from '#src/hooks/use-session.ts';
import { t } from '#src/lib/messages/t.ts';
import { paths } from '#src/lib/paths.ts';
import { AlarmCount } from './alarm-count.tsx';
import { listPages } from './list-pages.ts';
import { LiveIndicator } from './live-indicator.tsx';

/** Mark, pages by role, live connection, company, person. On a phone the pages have a row of their own. */
export function Header() {
  const { user, company } = useSession();
  return (
    <header data-print="never" className="border-b border-ink bg-sheet">
      <div className="flex flex-wrap items-stretch gap-x-7 px-4 sm:h-14 sm:flex-nowrap sm:px-7">
        <Link to={paths.first()} className="flex min-h-12 items-center gap-2.5 text-ink">
          <Mark />
          <span className="figures text-17 font-semibold tracking-[-0.02em]">{t('shell.wordmark')}</span>
        </Link>
        <nav
          aria-label={t('shell.navigation')}
          className="order-last -mx-4 flex basis-[calc(100%+2rem)] border-t border-rule sm:order-none sm:mx-0 sm:basis-auto sm:border-0"
        >
          {listPages(user.role).map(({ to, label }) => (
            <NavLink
              key={to}
              to={to}
              className="flex min-h-11 flex-1 items-center justify-center border-b-3 border-transparent px-2 font-medium text-ink-2 hover:text-ink aria-[current=page]:border-ink aria-[current=page]:text-ink sm:-mb-px sm:flex-none sm:px-3.5"
            >
              {t(label)}
              {label === 'shell.alarms' ? <AlarmCount /> : null}
            </NavLink>
          ))}
        </nav>
        <div className="ml-auto flex min-w-0 items-center gap-3 sm:gap-5">
          <LiveIndicator />
          <span className="hidden min-w-0 truncate text-ink-2 md:inline">
            {user.role === 'homeowner' ? t('shell.lookedAfter', { company: company.name }) : company.name}
          </span>
          <Link
            to={paths.profile()}
            className="figures flex min-h-8 min-w-9 items-center justify-center rounded-control border border-rule-strong px-2 hover:bg-wash"
          >
            {user.initials}
            <span className="sr-only">, {t('shell.profile', { name: user.name })}</span>
          </Link>
        </div>
      </div>
    </header>
  );
}
