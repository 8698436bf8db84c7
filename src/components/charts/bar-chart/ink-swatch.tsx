import type { Swatch } from '#src/components/charts/strip/strip-swatch.ts';
import { SwatchCanvas } from '#src/components/charts/strip/swatch-canvas.tsx';
import type { BarInk } from './bar-chart-data.ts';

const swatchOf = ({ texture, input }: BarInk): Swatch => (texture === 'hatch' ? input : texture);

/** A field of the legend in a bar's own ink. */
export const InkSwatch = ({ ink }: { readonly ink: BarInk }) => (
  <SwatchCanvas swatch={swatchOf(ink)} width={22} height={12} />
);
