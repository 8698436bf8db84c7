import { useEffect, useRef } from 'react';
import { readStripColours } from '#src/components/charts/strip/strip-colours.ts';
import { paintSwatch, type Swatch } from '#src/components/charts/strip/strip-swatch.ts';
import { useStore } from '#src/hooks/use-store.ts';
import { themeStore } from '#src/lib/theme.ts';
import type { BarInk } from './bar-chart-data.ts';

const WIDTH = 22;
const HEIGHT = 12;

const swatchOf = ({ texture, input }: BarInk): Swatch => (texture === 'hatch' ? input : texture);

/** A field of the legend in a bar's own ink. */
export function InkSwatch({ ink }: { readonly ink: BarInk }) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const theme = useStore(themeStore);
  useEffect(() => {
    const element = canvas.current;
    const context = element?.getContext('2d');
    if (element === null || context === null || context === undefined) return;
    const density = devicePixelRatio;
    element.width = WIDTH * density;
    element.height = HEIGHT * density;
    context.setTransform(density, 0, 0, density, 0, 0);
    paintSwatch(context, readStripColours(theme), density, swatchOf(ink), WIDTH, HEIGHT);
  }, [ink, theme]);
  return <canvas ref={canvas} className="shrink-0" style={{ width: WIDTH, height: HEIGHT }} />;
}
