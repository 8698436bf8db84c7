import type { StripColours } from './strip-colours.ts';
import { patternFor } from './strip-patterns.ts';
import type { Texture } from './strip-texture.ts';

/** A texture by name, an input by its number, or one of the two outlines. */
export type Swatch = Exclude<Texture, 'none' | 'hatch'> | number | 'planned' | 'off';

function line(
  context: CanvasRenderingContext2D,
  colour: string,
  width: number,
  y: number,
  length: number,
  dash: number[],
) {
  context.strokeStyle = colour;
  context.lineWidth = width;
  context.setLineDash(dash);
  context.beginPath();
  context.moveTo(0, y);
  context.lineTo(length, y);
  context.stroke();
}

function paintOff(context: CanvasRenderingContext2D, colours: StripColours, width: number, height: number) {
  const tone = colours.tone.soon;
  context.fillStyle = tone.ground;
  context.fillRect(0, 9, width, height - 9);
  line(context, tone.line, 1.8, 9, width, []);
  line(context, tone.line, 1.5, 3, width, [4, 3]);
}

/** One field of the legend, by the strip's own patterns. */
export function paintSwatch(
  context: CanvasRenderingContext2D,
  colours: StripColours,
  density: number,
  swatch: Swatch,
  width: number,
  height: number,
): void {
  context.clearRect(0, 0, width, height);
  if (swatch === 'off') {
    paintOff(context, colours, width, height);
    return;
  }
  context.setLineDash(swatch === 'planned' ? [3, 3] : []);
  if (swatch === 'wash') context.fillStyle = colours.wash;
  else if (typeof swatch === 'number') context.fillStyle = patternFor('hatch', swatch, undefined, colours, density);
  else if (swatch !== 'planned') context.fillStyle = patternFor(swatch, 0, undefined, colours, density);
  if (swatch !== 'planned') context.fillRect(0, 0, width, height);
  context.strokeStyle = swatch === 'planned' ? colours.ink3 : colours.ink;
  context.lineWidth = swatch === 'planned' ? 1 : 0.6;
  context.strokeRect(0.5, 0.5, width - 1, height - 1);
}
