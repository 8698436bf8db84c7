import { useEffect, useRef } from 'react';
import { useStore } from '#src/hooks/use-store.ts';
import { themeStore } from '#src/lib/theme.ts';
import { readStripColours } from './strip-colours.ts';
import { paintSwatch, type Swatch } from './strip-swatch.ts';

export type SwatchCanvasProps = { readonly swatch: Swatch; readonly width: number; readonly height: number };

/** A field of a legend, drawn by the strip's own pen; width and height in CSS pixels. */
export function SwatchCanvas({ swatch, width, height }: SwatchCanvasProps) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const theme = useStore(themeStore);
  useEffect(() => {
    const element = canvas.current;
    const context = element?.getContext('2d');
    if (element === null || context === null || context === undefined) return;
    const density = devicePixelRatio;
    element.width = width * density;
    element.height = height * density;
    context.setTransform(density, 0, 0, density, 0, 0);
    paintSwatch(context, readStripColours(theme), density, swatch, width, height);
  }, [swatch, theme, width, height]);
  return <canvas ref={canvas} className="shrink-0" style={{ width, height }} />;
}
