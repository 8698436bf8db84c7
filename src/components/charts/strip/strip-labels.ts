import type { StripRun } from './strip-run.ts';
import type { StripBlock, StripLayout } from './strip-view.ts';

export type StripLabel = { readonly text: string; readonly x: number; readonly y: number };

/** Blocks that say the same and lie side by side. `texts` may be written above them, the fullest first. */
type Stretch = { readonly texts: readonly string[]; readonly x: number; readonly end: number; readonly y: number };
type Box = { readonly x: number; readonly end: number; readonly y: number };

const INDENT = 6;
const LIFT = 7;
const LINE = 15;

const nameOf = ({ texts }: Stretch) => texts[0] ?? '';

/** Neighbouring blocks that say the same are one stretch: input 1 alone, then input 1 winning over input 2. */
function joinStretches(blocks: readonly StripBlock[], textsOf: (run: StripRun) => readonly string[]): Stretch[] {
  const stretches: Stretch[] = [];
  for (const { run, x, width, y } of blocks) {
    const texts = textsOf(run);
    const last = stretches.at(-1);
    if (texts.length === 0) continue;
    if (last !== undefined && nameOf(last) === texts[0] && Math.abs(last.end - x) < 2) {
      stretches[stretches.length - 1] = { ...last, end: x + width, y: Math.min(last.y, y) };
    } else stretches.push({ texts, x, end: x + width, y });
  }
  return stretches;
}

/** The widest stretch of each name, from left to right. */
function widestOfEach(stretches: readonly Stretch[]): Stretch[] {
  const widest = new Map<string, Stretch>();
  for (const stretch of stretches) {
    const known = widest.get(nameOf(stretch));
    if (known === undefined || stretch.end - stretch.x > known.end - known.x) widest.set(nameOf(stretch), stretch);
  }
  return [...widest.values()].sort((a, b) => a.x - b.x);
}

/** Whether words in a box would cover a taller neighbour, another label, the now line or the paper's edge. */
function isFree(
  box: Box,
  stretch: Stretch,
  { blocks, nowX }: StripLayout,
  placed: readonly Box[],
  width: number,
): boolean {
  const bottom = box.y + 3;
  const covers = blocks.some(
    (block) => block.x < box.end && block.x + block.width > Math.max(box.x, stretch.end) && block.y < bottom,
  );
  const clashes = placed.some((other) => box.x < other.end + INDENT && Math.abs(other.y - box.y) < LINE);
  const crossesNow = nowX !== undefined && box.x < nowX && box.end > nowX;
  return box.end <= width && box.y >= LINE - 3 && !covers && !clashes && !crossesNow;
}

/** Words above the runs: each thing is named once, at its widest stretch, as fully as there is room for. */
export function placeLabels(
  layout: StripLayout,
  textsOf: (run: StripRun) => readonly string[],
  measure: (text: string) => number,
  width: number,
): StripLabel[] {
  const placed: (StripLabel & Box)[] = [];
  for (const stretch of widestOfEach(joinStretches(layout.blocks, textsOf))) {
    const x = stretch.x + INDENT;
    const y = stretch.y - LIFT;
    const boxes = stretch.texts.map((text) => ({ text, x, y, end: x + measure(text) }));
    const fitting = boxes.find((box) => isFree(box, stretch, layout, placed, width));
    if (fitting !== undefined) placed.push(fitting);
  }
  return placed.map(({ text, x, y }) => ({ text, x, y }));
}
