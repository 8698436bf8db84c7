import type { Priority } from '#shared/domain/detectors/detector.ts';
import type { Theme } from '#src/lib/theme.ts';

export type StripColours = {
  readonly theme: Theme;
  readonly sheet: string;
  readonly rule: string;
  readonly ruleStrong: string;
  readonly ink: string;
  readonly ink3: string;
  readonly wash: string;
  readonly hatch: string;
  readonly tone: Readonly<Record<Priority, { readonly line: string; readonly ground: string }>>;
};

const kept = new Map<Theme, StripColours>();

/** The tokens as a canvas needs them, read from the page once for each theme. */
export function readStripColours(theme: Theme): StripColours {
  const known = kept.get(theme);
  if (known !== undefined) return known;
  const style = getComputedStyle(document.documentElement);
  const token = (name: string) => style.getPropertyValue(`--${name}`).trim();
  const colours: StripColours = {
    theme,
    sheet: token('sheet'),
    rule: token('rule'),
    ruleStrong: token('rule-strong'),
    ink: token('ink'),
    ink3: token('ink-3'),
    wash: token('wash'),
    hatch: token('hatch'),
    tone: {
      urgent: { line: token('p1'), ground: token('p1-ground') },
      soon: { line: token('p2'), ground: token('p2-ground') },
      note: { line: token('p3'), ground: token('p3-ground') },
    },
  };
  kept.set(theme, colours);
  return colours;
}
