import type { Config } from 'tailwindcss';

/** A colour lives once, as a CSS variable in src/styles; here it only gets its utility name. */
const token = (name: string) => `var(--${name})`;

export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  darkMode: ['selector', '[data-theme="dark"]'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      paper: token('paper'),
      sheet: token('sheet'),
      rule: { DEFAULT: token('rule'), strong: token('rule-strong') },
      ink: { DEFAULT: token('ink'), 2: token('ink-2'), 3: token('ink-3') },
      wash: token('wash'),
      hatch: token('hatch'),
      p1: { DEFAULT: token('p1'), ground: token('p1-ground') },
      p2: { DEFAULT: token('p2'), ground: token('p2-ground') },
      p3: { DEFAULT: token('p3'), ground: token('p3-ground') },
      focus: token('focus'),
    },
    fontFamily: {
      words: ['"Atkinson Hyperlegible Next"', 'system-ui', 'sans-serif'],
      figures: ['"JetBrains Mono"', 'ui-monospace', 'monospace'],
    },
    // Nothing on a screen is smaller than 13 px.
    fontSize: {
      13: ['0.8125rem', '1.125rem'],
      15: ['0.9375rem', '1.375rem'],
      17: ['1.0625rem', '1.5rem'],
      20: ['1.25rem', '1.75rem'],
      27: ['1.6875rem', '2.125rem'],
      34: ['2.125rem', '2.5rem'],
    },
    borderRadius: { none: '0', control: '4px' },
    boxShadow: { none: 'none' },
    extend: {
      minHeight: { touch: '48px' },
      minWidth: { touch: '48px' },
      transitionDuration: { DEFAULT: '120ms' },
    },
  },
} satisfies Config;
