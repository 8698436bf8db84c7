import { useLayoutEffect, useMemo, useRef } from 'react';
import { useStore } from '#src/hooks/use-store.ts';
import { createStore } from '#src/lib/store.ts';
import { themeStore } from '#src/lib/theme.ts';
import { readStripColours } from './strip-colours.ts';
import { placeLabels } from './strip-labels.ts';
import { STRIP_METRICS, type StripSize } from './strip-metrics.ts';
import { LABEL_FONT, NUMERAL_FONT, paintStrip, type StripPicture } from './strip-paint.ts';
import type { StripRun } from './strip-run.ts';
import { listRules } from './strip-ticks.ts';
import { layoutStrip, type StripInput } from './strip-view.ts';

export type StripCanvasProps = StripInput & {
  readonly size: StripSize;
  readonly width: number;
  /** Zone of the ruled lines: the wall's is the company's, a single pad's its own. */
  readonly zone: string;
  /** What may be written above a run, the fullest first: the first that fits is taken. */
  readonly labelOf?: ((run: StripRun) => readonly string[]) | undefined;
};

/** A canvas drawn before its font has come must be drawn again. */
const fontStore = createStore(false);
if (typeof document !== 'undefined') {
  void Promise.all([NUMERAL_FONT, LABEL_FONT].map((font) => document.fonts.load(font))).then(() => fontStore.set(true));
}

/** Wide of what a label takes, until a canvas can measure it. */
const PIXELS_A_LETTER = 6.9;
const ruler = typeof document === 'undefined' ? null : document.createElement('canvas').getContext('2d');

function measureLabel(text: string): number {
  if (ruler === null) return text.length * PIXELS_A_LETTER;
  ruler.font = LABEL_FONT;
  return ruler.measureText(text).width;
}

/** The strip itself: one canvas, sharp at any density, in the theme's ink. It says nothing by itself: see Strip. */
export function StripCanvas(props: StripCanvasProps) {
  const { size, width, zone, labelOf, runs, planned, window, now, tone, topRpm, unprimedSince } = props;
  const canvas = useRef<HTMLCanvasElement>(null);
  const theme = useStore(themeStore);
  const fonts = useStore(fontStore);
  const metrics = STRIP_METRICS[size];
  const rules = useMemo(() => listRules(window, zone, width), [window, zone, width]);
  const picture = useMemo((): StripPicture => {
    const layout = layoutStrip({ runs, planned, window, now, tone, topRpm, unprimedSince }, width, metrics);
    const labels = metrics.labelled && labelOf !== undefined ? placeLabels(layout, labelOf, measureLabel, width) : [];
    return { layout, rules, labels, metrics, width };
  }, [runs, planned, window, now, tone, topRpm, unprimedSince, width, metrics, labelOf, rules]);

  // Before the browser paints or prints: a page on its way to paper must not show last theme's ink.
  // biome-ignore lint/correctness/useExhaustiveDependencies: `fonts` is no input of the drawing, its arrival is a reason to draw again.
  useLayoutEffect(() => {
    const element = canvas.current;
    const context = element?.getContext('2d');
    if (element === null || context === null || context === undefined || width === 0) return;
    const density = globalThis.devicePixelRatio;
    element.width = Math.round(width * density);
    element.height = Math.round(metrics.height * density);
    context.setTransform(density, 0, 0, density, 0, 0);
    paintStrip(context, readStripColours(theme), density, picture);
  }, [picture, theme, fonts, width, metrics]);

  return <canvas ref={canvas} className="block w-full" style={{ height: metrics.height }} />;
}
