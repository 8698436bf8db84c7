import type { StripRun } from './strip-run.ts';
import type { StripBlock } from './strip-view.ts';

export type StripLabel = { readonly text: string; readonly x: number; readonly y: number };

type Stretch = { readonly text: string; readonly x: number; readonly end: number; readonly y: number };

const INDENT = 6;
const LIFT = 7;
const LINE = 15;

/** Neighbouring blocks that say the same are one stretch: input 1 alone, then input 1 winning over input 2. */
function joinStretches(blocks: readonly StripBlock[], textOf: (run: StripRun) => string | undefined): Stretch[] {
  const stretches: Stretch[] = [];
  for (const block of blocks) {
    const text = textOf(block.run);
    const last = stretches.at(-1);
    const end = block.x + block.width;
    if (text === undefined) continue;
    if (last !== undefined && last.text === text && Math.abs(last.end - block.x) < 2) {
      stretches[stretches.length - 1] = { ...last, end, y: Math.min(last.y, block.y) };
    } else stretches.push({ text, x: block.x, end, y: block.y });
  }
  return stretches;
}

/**
 * Words above the runs: each thing is named once, at its widest stretch, and only where the words cover neither a
 * taller neighbour, nor another label, nor the paper's edge.
 */
export function placeLabels(
  blocks: readonly StripBlock[],
  textOf: (run: StripRun) => string | undefined,
  measure: (text: string) => number,
  width: number,
): StripLabel[] {
  const widest = new Map<string, Stretch>();
  for (const stretch of joinStretches(blocks, textOf)) {
    const known = widest.get(stretch.text);
    if (known === undefined || stretch.end - stretch.x > known.end - known.x) widest.set(stretch.text, stretch);
  }
  const placed: (StripLabel & { readonly end: number })[] = [];
  for (const { text, x, end, y } of [...widest.values()].sort((a, b) => a.x - b.x)) {
    const left = x + INDENT;
    const right = left + measure(text);
    const bottom = y - LIFT + 3;
    const covered = blocks.some(
      (block) => block.x < right && block.x + block.width > Math.max(left, end) && block.y < bottom,
    );
    const clash = placed.some((other) => left < other.end + INDENT && Math.abs(other.y - (y - LIFT)) < LINE);
    if (right <= width && y - LIFT >= LINE - 3 && !covered && !clash)
      placed.push({ text, x: left, y: y - LIFT, end: right });
  }
  return placed.map(({ text, x, y }) => ({ text, x, y }));
}
