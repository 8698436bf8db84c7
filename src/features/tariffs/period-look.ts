import type { CSSProperties } from 'react';

const lines = (angle: number, ink: string, ground: string, every: number): string =>
  `repeating-linear-gradient(${angle}deg, var(--${ink}) 0 1px, var(--${ground}) 1px ${every}px)`;
const glass = (angle: number, every: number): string =>
  `repeating-linear-gradient(${angle}deg, var(--hatch) 0 1px, transparent 1px ${every}px)`;

/** Textures, no hues: plain, wash, and what the strips know. Further periods begin anew; their numerals tell them apart. */
const LOOKS: readonly CSSProperties[] = [
  { backgroundColor: 'var(--sheet)' },
  { backgroundColor: 'var(--wash)' },
  { backgroundImage: lines(45, 'hatch', 'wash', 5) },
  { backgroundImage: 'radial-gradient(var(--ink) 1px, var(--sheet) 1.4px)', backgroundSize: '5px 5px' },
  { backgroundImage: `${glass(45, 5)}, ${glass(-45, 5)}`, backgroundColor: 'var(--wash)' },
  { backgroundImage: lines(90, 'ink', 'sheet', 4) },
  { backgroundImage: lines(0, 'hatch', 'sheet', 5) },
];

const HOLE: CSSProperties = { backgroundImage: lines(-45, 'p1', 'p1-ground', 6) };

/** How the hours of a period are drawn; a hole in the colour of what must be seen to. */
export const periodLook = (period: number | null): CSSProperties =>
  period === null ? HOLE : (LOOKS[period % LOOKS.length] ?? {});
