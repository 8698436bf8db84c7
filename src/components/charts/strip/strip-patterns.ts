import type { Priority } from '#shared/domain/detectors/detector.ts';
import type { StripColours } from './strip-colours.ts';
import { hatchAngle, type Texture } from './strip-texture.ts';

type Ink = { readonly ground: string | undefined; readonly stroke: string };
type Tile = {
  readonly width: number;
  readonly height: number;
  readonly draw: (context: CanvasRenderingContext2D, ink: Ink) => void;
};

const bar = (context: CanvasRenderingContext2D, x: number, y: number, width: number, height: number) =>
  context.fillRect(x, y, width, height);

const TILES: Readonly<Record<Exclude<Texture, 'none' | 'wash'>, Tile>> = {
  hatch: { width: 6, height: 6, draw: (context) => bar(context, 0, 0, 2, 6) },
  cross: {
    width: 6,
    height: 6,
    draw: (context) => {
      bar(context, 0, 0, 2, 6);
      bar(context, 0, 0, 6, 2);
    },
  },
  prime: { width: 3, height: 6, draw: (context) => bar(context, 0, 0, 1.5, 6) },
  dots: {
    width: 5,
    height: 5,
    draw: (context) => {
      context.beginPath();
      context.arc(2.5, 2.5, 1.2, 0, 7);
      context.fill();
    },
  },
  dashes: { width: 8, height: 5, draw: (context) => bar(context, 0, 1.8, 5, 1.4) },
  gap: {
    width: 8,
    height: 8,
    draw: (context) => {
      context.beginPath();
      context.arc(2, 2, 0.9, 0, 7);
      context.fill();
    },
  },
};

function inkOf(texture: keyof typeof TILES, tone: Priority | undefined, colours: StripColours): Ink {
  if (tone !== undefined)
    return { ground: texture === 'prime' ? undefined : colours.tone[tone].ground, stroke: colours.tone[tone].line };
  if (texture === 'gap') return { ground: undefined, stroke: colours.ink3 };
  if (texture === 'prime') return { ground: undefined, stroke: colours.ink };
  return { ground: colours.wash, stroke: texture === 'dots' ? colours.ink : colours.hatch };
}

const angleOf = (texture: Texture, input: number) =>
  texture === 'cross' ? 45 : texture === 'hatch' ? hatchAngle(input) : 0;

const kept = new Map<string, CanvasPattern>();

/**
 * The fill of a textured block, made once for each texture, slope, tone, theme and pixel density. A tile is drawn at
 * the screen's own density and scaled back, so that its edges stay sharp.
 */
export function patternFor(
  texture: keyof typeof TILES,
  input: number,
  tone: Priority | undefined,
  colours: StripColours,
  density: number,
): CanvasPattern | string {
  const angle = angleOf(texture, input);
  const key = [texture, angle, tone, colours.theme, density].join(' ');
  const known = kept.get(key);
  if (known !== undefined) return known;
  const tile = TILES[texture];
  const ink = inkOf(texture, tone, colours);
  // Rounded to whole device pixels, or the seams between tiles would show.
  const width = Math.max(1, Math.round(tile.width * density));
  const height = Math.max(1, Math.round(tile.height * density));
  const canvas = document.createElement('canvas');
  canvas.width = width;
  canvas.height = height;
  const context = canvas.getContext('2d');
  if (context === null) return ink.stroke;
  context.scale(width / tile.width, height / tile.height);
  if (ink.ground !== undefined) {
    context.fillStyle = ink.ground;
    context.fillRect(0, 0, tile.width, tile.height);
  }
  context.fillStyle = ink.stroke;
  tile.draw(context, ink);
  const pattern = context.createPattern(canvas, 'repeat');
  if (pattern === null) return ink.stroke;
  pattern.setTransform(new DOMMatrix().rotate(angle).scale(tile.width / width, tile.height / height));
  kept.set(key, pattern);
  return pattern;
}
