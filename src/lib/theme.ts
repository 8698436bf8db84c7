import type { Preferences } from '#shared/contract/http/session.ts';
import { createStore, type Store } from './store.ts';

export type ThemeChoice = Preferences['theme'];
export type Theme = 'light' | 'dark';

/** Also read by src/static/before-first-paint.js, which cannot import it. */
const STORAGE_KEY = 'millrace-theme';

const readChoice = (): ThemeChoice => {
  try {
    const stored = localStorage.getItem(STORAGE_KEY);
    return stored === 'light' || stored === 'dark' ? stored : 'system';
  } catch {
    return 'system';
  }
};

const effectiveTheme = (choice: ThemeChoice): Theme => {
  if (matchMedia('print').matches) return 'light';
  if (choice !== 'system') return choice;
  return matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light';
};

/** The theme on screen now; canvases follow it to repaint. */
export const themeStore: Store<Theme> = createStore<Theme>('light');

const apply = () => {
  const theme = effectiveTheme(readChoice());
  document.documentElement.dataset.theme = theme;
  themeStore.set(theme);
};

/** Follows the system, and turns to light ink on paper while the page is being printed. */
export function watchTheme(): void {
  apply();
  matchMedia('(prefers-color-scheme: dark)').addEventListener('change', apply);
  matchMedia('print').addEventListener('change', apply);
}

export function chooseTheme(choice: ThemeChoice): void {
  try {
    if (choice === 'system') localStorage.removeItem(STORAGE_KEY);
    else localStorage.setItem(STORAGE_KEY, choice);
  } catch {
    // Storage is switched off: the choice comes back with the session's preferences.
  }
  apply();
}
