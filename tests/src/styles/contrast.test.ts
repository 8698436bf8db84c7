import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

type Theme = Readonly<Record<string, string>>;

const css = readFileSync(join(import.meta.dirname, '../../../src/styles/tokens.css'), 'utf8');
const readTokens = (selector: string): Theme => {
  const block = css.slice(css.indexOf(selector)).match(/\{([^}]*)\}/)?.[1] ?? '';
  return Object.fromEntries(
    [...block.matchAll(/--([\w-]+):\s*(#[0-9a-f]{6})/g)].map((match) => [match[1] ?? '', match[2] ?? '']),
  );
};
const themes: Readonly<Record<string, Theme>> = { light: readTokens(':root'), dark: readTokens('[data-theme="dark"]') };

/** Relative luminance and contrast ratio. Source: WCAG 2.2, definitions, https://www.w3.org/TR/WCAG22/#dfn-relative-luminance */
function luminance(colour: string): number {
  const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((start) => {
    const share = Number.parseInt(colour.slice(start, start + 2), 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(one: string, other: string): number {
  const [light = 0, dark = 0] = [luminance(one), luminance(other)].sort((a, b) => b - a);
  return (light + 0.05) / (dark + 0.05);
}

/** Words on what they stand on: 4.5 (WCAG 1.4.3, AA). */
const TEXT_PAIRS = [
  ...['paper', 'sheet', 'wash'].map((ground) => ['ink', ground]),
  ...['paper', 'sheet'].flatMap((ground) => ['ink-2', 'p1', 'p2', 'p3', 'focus'].map((text) => [text, ground])),
  ['p1', 'p1-ground'],
  ['p2', 'p2-ground'],
  ['p3', 'p3-ground'],
  ['sheet', 'ink'],
  ['sheet', 'ink-2'],
  ['sheet', 'focus'],
  ['sheet', 'p1'],
] as const;

/** Lines, strokes and frames that carry meaning: 3 (WCAG 1.4.11, AA). */
const SHAPE_PAIRS = [
  ['ink', 'sheet'],
  ['ink-2', 'sheet'],
  ['hatch', 'sheet'],
  ['p1', 'p1-ground'],
  ['p2', 'p2-ground'],
  ['p3', 'p3-ground'],
  ['focus', 'paper'],
  ['focus', 'sheet'],
  ['sheet', 'p2'],
  ['sheet', 'p3'],
  ['ink-3', 'sheet'],
] as const;

it('measures contrast as WCAG does', () => {
  expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 5);
  expect(contrast('#777777', '#ffffff')).toBeCloseTo(4.48, 2);
});

describe.each(Object.entries(themes))('%s', (_, theme) => {
  const measure = ([one, other]: readonly (string | undefined)[]) =>
    contrast(theme[one ?? ''] ?? '', theme[other ?? ''] ?? '');

  it.each(TEXT_PAIRS)('words: %s on %s', (...pair) => {
    expect(measure(pair)).toBeGreaterThanOrEqual(4.5);
  });

  it.each(SHAPE_PAIRS)('shapes: %s on %s', (...pair) => {
    expect(measure(pair)).toBeGreaterThanOrEqual(3);
  });
});

it('has every token in both themes, and nowhere else a colour of its own', () => {
  expect(Object.keys(themes.dark ?? {})).toEqual(Object.keys(themes.light ?? {}));
  const config = readFileSync(join(import.meta.dirname, '../../../tailwind.config.ts'), 'utf8');
  for (const name of Object.keys(themes.light ?? {})) expect(config).toContain(`token('${name}')`);
  expect(config).not.toMatch(/#[0-9a-f]{3,6}/i);
});
