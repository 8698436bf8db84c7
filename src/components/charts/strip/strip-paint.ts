import type { StripColours } from './strip-colours.ts';
import type { StripLabel } from './strip-labels.ts';
import type { StripMetrics } from './strip-metrics.ts';
import { patternFor } from './strip-patterns.ts';
import type { StripTick } from './strip-ticks.ts';
import type { StripBlock, StripLayout } from './strip-view.ts';

export type StripPicture = {
  readonly layout: StripLayout;
  readonly rules: { readonly fine: readonly StripTick[]; readonly strong: readonly StripTick[] };
  readonly labels: readonly StripLabel[];
  readonly metrics: StripMetrics;
  readonly width: number;
};

export const NUMERAL_FONT = '600 13px "JetBrains Mono", monospace';
export const LABEL_FONT = '500 13px "Atkinson Hyperlegible Next", sans-serif';

type Pen = { readonly context: CanvasRenderingContext2D; readonly colours: StripColours; readonly density: number };

function stroke(
  { context }: Pen,
  colour: string,
  width: number,
  x1: number,
  y1: number,
  x2: number,
  y2: number,
  dash: number[] = [],
) {
  context.strokeStyle = colour;
  context.lineWidth = width;
  context.setLineDash(dash);
  context.beginPath();
  context.moveTo(x1, y1);
  context.lineTo(x2, y2);
  context.stroke();
}

function paintRules(pen: Pen, { rules, metrics, width }: StripPicture) {
  const { colours } = pen;
  for (const { x } of rules.fine) stroke(pen, colours.rule, 0.6, x, 0, x, metrics.height);
  for (const { x } of rules.strong) stroke(pen, colours.rule, 1.2, x, 0, x, metrics.height);
  for (const share of [1 / 3, 2 / 3, 1]) {
    const y = metrics.base - share * (metrics.base - metrics.top);
    stroke(pen, colours.rule, 0.7, 0, y, width, y);
  }
}

function paintFill(pen: Pen, { texture, x, y, width, height, input, tone }: StripBlock) {
  const { context, colours, density } = pen;
  if (texture === 'none') return;
  const flat = texture === 'wash' || (tone !== undefined && texture !== 'prime' && texture !== 'gap');
  context.fillStyle = flat
    ? tone === undefined
      ? colours.wash
      : colours.tone[tone].ground
    : patternFor(texture, input, tone, colours, density);
  context.fillRect(x, y, width, height);
}

function paintUnheard({ context, colours, density }: Pen, { unheard }: StripLayout) {
  context.fillStyle = patternFor('gap', 0, undefined, colours, density);
  for (const { x, y, width, height } of unheard) context.fillRect(x, y, width, height);
}

function paintPen(pen: Pen, block: StripBlock, before: StripBlock | undefined, metrics: StripMetrics) {
  const { colours } = pen;
  if (block.texture === 'gap') return;
  const colour = block.tone === undefined ? colours.ink : colours.tone[block.tone].line;
  stroke(pen, colour, metrics.pen, block.x, block.y, block.x + block.width, block.y);
  if (before === undefined || before.texture === 'gap' || Math.abs(before.x + before.width - block.x) > 3) return;
  stroke(pen, colours.ink, 0.8, block.x, before.y, block.x, block.y);
}

/** A narrower block would be all numeral and no hatch. */
const NUMERAL_ROOM = 30;

/** Which input commands, for certain: direction alone is hard to tell in a narrow block. */
function paintNumeral({ context, colours }: Pen, { texture, x, y, width, height, input, tone }: StripBlock) {
  if ((texture !== 'hatch' && texture !== 'cross') || input === 0 || width < NUMERAL_ROOM || height < 18) return;
  const ground = tone === undefined ? colours.wash : colours.tone[tone].ground;
  context.fillStyle = ground;
  context.fillRect(x + 1, y + 2, 13, 15);
  context.fillStyle = tone === undefined ? colours.ink : colours.tone[tone].line;
  context.font = NUMERAL_FONT;
  context.fillText(String(input), x + 3.5, y + 14);
}

function paintExpected(pen: Pen, { expectedY, x, width, tone }: StripBlock) {
  if (expectedY === undefined || tone === undefined) return;
  stroke(pen, pen.colours.tone[tone].line, 1.5, x, expectedY, x + width, expectedY, [4, 3]);
}

function paintPlanned({ context, colours }: Pen, { layout }: StripPicture) {
  context.strokeStyle = colours.ink3;
  context.lineWidth = 1;
  context.setLineDash([3, 3]);
  for (const { x, y, width, height } of layout.planned)
    context.strokeRect(x + 0.5, y + 0.5, Math.max(0, width - 1), height);
}

function paintLabels({ context, colours }: Pen, { labels }: StripPicture) {
  context.font = LABEL_FONT;
  context.fillStyle = colours.ink;
  for (const { text, x, y } of labels) context.fillText(text, x, y);
}

/** Draws one strip. `context` is in CSS pixels already; until its runs have come it is ruled paper without ink. */
export function paintStrip(
  context: CanvasRenderingContext2D,
  colours: StripColours,
  density: number,
  picture: StripPicture,
): void {
  const { layout, metrics, width } = picture;
  const pen: Pen = { context, colours, density };
  context.clearRect(0, 0, width, metrics.height);
  paintRules(pen, picture);
  if (!layout.known) return;
  paintUnheard(pen, layout);
  for (const block of layout.blocks) paintFill(pen, block);
  paintPlanned(pen, picture);
  // What is off its expected speed comes last: a try of seconds must not vanish under its neighbours' ink.
  for (const marked of [false, true]) {
    layout.blocks.forEach((block, index) => {
      if ((block.tone !== undefined) !== marked) return;
      paintPen(pen, block, layout.blocks[index - 1], metrics);
      paintExpected(pen, block);
      paintNumeral(pen, block);
    });
  }
  stroke(pen, colours.ink, 0.7, 0, metrics.base, width, metrics.base);
  paintLabels(pen, picture);
  if (layout.nowX !== undefined) stroke(pen, colours.ink, 1, layout.nowX, 0, layout.nowX, metrics.height);
}
