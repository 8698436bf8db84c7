import type { Texture } from '#src/components/charts/strip/strip-texture.ts';

/** How a part of a bar is inked: the strip's textures; `input` is the slope of a hatch. Parts are told apart without colour. */
export type BarInk = { readonly texture: Exclude<Texture, 'none' | 'gap' | 'prime'>; readonly input: number };

const INKS: readonly BarInk[] = [
  { texture: 'wash', input: 0 },
  { texture: 'hatch', input: 1 },
  { texture: 'hatch', input: 2 },
  { texture: 'cross', input: 0 },
  { texture: 'dots', input: 0 },
  { texture: 'dashes', input: 0 },
];

/** The ink of a part by its place; after the sixth they begin again. */
export const inkOfPart = (index: number): BarInk => INKS[index % INKS.length] ?? { texture: 'wash', input: 0 };

/** One part of every bar, the lowest first. */
export type BarPart = { readonly label: string; readonly values: readonly (number | null)[] };

export type BarData = {
  /** What stands under each bar; all are kept, those with room are written. */
  readonly labels: readonly string[];
  readonly parts: readonly BarPart[];
  /** A dashed line to compare with. */
  readonly aim?: number | undefined;
};

/** Heights up to and with each part; null only where no part has a value. */
export function stackParts({ labels, parts }: BarData): (number | null)[][] {
  return parts.map((_, index) =>
    labels.map((_label, at) => {
      const values = parts.slice(0, index + 1).map(({ values: column }) => column[at] ?? null);
      return parts.every(({ values: column }) => (column[at] ?? null) === null)
        ? null
        : values.reduce<number>((sum, value) => sum + (value ?? 0), 0);
    }),
  );
}

/** Which bars are named, so that neighbouring names keep `apart` pixels. */
export function nameBars(count: number, width: number, apart: number): number[] {
  const room = Math.max(1, Math.floor(width / apart));
  const step = Math.max(1, Math.ceil(count / room));
  return Array.from({ length: Math.ceil(count / step) }, (_, index) => index * step);
}
