import type { Priority } from '#shared/domain/detectors/detector.ts';
import type { StripMetrics } from './strip-metrics.ts';
import { STANDSTILL_RPM, type StripPlan, type StripRun, type StripWindow } from './strip-run.ts';
import { createStripScale, type StripScale } from './strip-scale.ts';
import { type Texture, textureOf } from './strip-texture.ts';

/** One run on the paper, in CSS pixels. `tone` only where it is off its expected speed. */
export type StripBlock = {
  readonly run: StripRun;
  readonly x: number;
  readonly width: number;
  readonly y: number;
  readonly height: number;
  readonly texture: Texture;
  readonly input: number;
  readonly tone: Priority | undefined;
  /** Where the expected speed is dashed above, when the run is off it. */
  readonly expectedY: number | undefined;
};

export type StripOutline = { readonly x: number; readonly width: number; readonly y: number; readonly height: number };

export type StripLayout = {
  /** The runs have come; until then there is no ink at all. */
  readonly known: boolean;
  readonly blocks: readonly StripBlock[];
  /** Time gone by that no run covers: nothing was heard, which is not the same as standing still. */
  readonly unheard: readonly StripOutline[];
  readonly planned: readonly StripOutline[];
  readonly nowX: number | undefined;
};

export type StripInput = {
  /** Undefined until they have come. */
  readonly runs: readonly StripRun[] | undefined;
  readonly planned: readonly StripPlan[];
  readonly window: StripWindow;
  readonly now: number;
  /** Colour of what is off the expected speed: the priority of the pump's alarm. */
  readonly tone: Priority;
  readonly topRpm: number;
  /** Since when an alarm says that the pump does not prime: its primes from then on are off as well. */
  readonly unprimedSince?: number | undefined;
};

/** A prime of two minutes is half a pixel on a day's row and must still be seen. */
const NARROWEST = 1.5;

const isMarked = ({ flags, source, from }: StripRun, unprimedSince = Number.POSITIVE_INFINITY) =>
  flags.includes('off-expected') || flags.includes('unprimed') || (source === 'prime' && from >= unprimedSince);

function layoutBlock(run: StripRun, input: StripInput, scale: StripScale, metrics: StripMetrics): StripBlock {
  const { window, now } = input;
  const from = Math.max(run.from, window.from);
  const until = Math.min(run.to ?? Math.max(now, run.from), window.until);
  const texture = textureOf(run);
  const x = scale.x(from);
  const y = texture === 'gap' ? metrics.top - 4 : scale.y(run.meanRpm < STANDSTILL_RPM ? 0 : run.meanRpm);
  const off = run.flags.includes('off-expected') && run.expectedRpm >= STANDSTILL_RPM;
  return {
    run,
    x,
    width: Math.max(scale.x(until) - x, NARROWEST),
    y,
    height: metrics.base - y,
    texture,
    input: run.activeInput,
    tone: isMarked(run, input.unprimedSince) ? input.tone : undefined,
    expectedY: off ? scale.y(run.expectedRpm) : undefined,
  };
}

/** Narrower than this it is the seam between two runs. */
const SEAM = 1;

function layoutUnheard(blocks: readonly StripBlock[], endX: number, metrics: StripMetrics): StripOutline[] {
  const y = metrics.top - 4;
  const unheard: StripOutline[] = [];
  let x = 0;
  for (const block of blocks) {
    if (block.x - x > SEAM) unheard.push({ x, width: block.x - x, y, height: metrics.base - y });
    x = Math.max(x, block.x + block.width);
  }
  return endX - x > SEAM ? [...unheard, { x, width: endX - x, y, height: metrics.base - y }] : unheard;
}

const NOTHING: StripLayout = { known: false, blocks: [], unheard: [], planned: [], nowX: undefined };

const overlaps = (from: number, to: number, window: StripWindow) => from < window.until && to > window.from;

/** Everything a strip draws, as plain numbers: the same for canvas, tests and print. */
export function layoutStrip(input: StripInput, width: number, metrics: StripMetrics): StripLayout {
  const { runs, window, now } = input;
  if (runs === undefined) return NOTHING;
  const scale = createStripScale(window, width, metrics, input.topRpm);
  const shown = runs.filter(({ from, to }) => overlaps(from, to ?? Math.max(now, from + 1), window));
  const ahead = input.planned.filter(({ from, to, rpm }) => rpm > 0 && to > now && overlaps(from, to, window));
  const blocks = shown.map((run) => layoutBlock(run, input, scale, metrics));
  return {
    known: true,
    blocks,
    unheard: layoutUnheard(blocks, scale.x(Math.min(now, window.until)), metrics),
    planned: ahead.map(({ from, to, rpm }) => {
      const x = scale.x(Math.max(from, now, window.from));
      return {
        x,
        width: scale.x(Math.min(to, window.until)) - x,
        y: scale.y(rpm),
        height: metrics.base - scale.y(rpm),
      };
    }),
    nowX: now >= window.from && now < window.until ? scale.x(now) : undefined,
  };
}
