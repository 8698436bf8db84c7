import { type PointerEvent, useLayoutEffect, useMemo, useRef, useState } from 'react';
import { readStripColours } from '#src/components/charts/strip/strip-colours.ts';
import { useElementWidth } from '#src/hooks/use-element-width.ts';
import { useStore } from '#src/hooks/use-store.ts';
import { themeStore } from '#src/lib/theme.ts';
import { type HourPlace, type HourRow, layoutHours, type PriceRow, placeAt } from './hour-map-view.ts';
import { paintHours } from './paint-hours.ts';

export type HourMapProps = {
  readonly rows: readonly HourRow[];
  readonly prices: readonly PriceRow[];
  readonly hourLabel: (hour: number) => string;
  /** What the picture is of, for those who do not see it; its numbers stand in a table beside it. */
  readonly name: string;
  /** The sentence for what lies under the pointer. */
  readonly describe: (place: HourPlace) => string;
  readonly idle: string;
};

/** Days by hours, one canvas: the darker, the more. */
export function HourMap({ rows, prices, hourLabel, name, describe, idle }: HourMapProps) {
  const [measure, width] = useElementWidth<HTMLDivElement>();
  const canvas = useRef<HTMLCanvasElement>(null);
  const theme = useStore(themeStore);
  const [place, setPlace] = useState<HourPlace>();
  const layout = useMemo(() => layoutHours(width, prices.length, rows.length), [width, prices.length, rows.length]);
  const most = useMemo(() => Math.max(0, ...rows.flatMap(({ values }) => values.map((value) => value ?? 0))), [rows]);
  useLayoutEffect(() => {
    const element = canvas.current;
    const context = element?.getContext('2d');
    if (element === null || context === null || context === undefined || width === 0) return;
    const density = devicePixelRatio;
    const paint = () => {
      element.width = Math.round(width * density);
      element.height = Math.round(layout.height * density);
      context.setTransform(density, 0, 0, density, 0, 0);
      paintHours(
        { context, colours: readStripColours(theme), density },
        { rows, prices, most, hourLabel, layout, width },
      );
    };
    paint();
    // A canvas drawn before its font has come is drawn once more.
    void document.fonts.ready.then(paint);
  }, [rows, prices, most, hourLabel, layout, width, theme]);
  const follow = (event: PointerEvent) => {
    const box = event.currentTarget.getBoundingClientRect();
    setPlace(placeAt(event.clientX - box.left, event.clientY - box.top, layout, prices.length, rows.length));
  };
  return (
    <div className="flex flex-col gap-1">
      <div
        ref={measure}
        role="img"
        aria-label={name}
        className="touch-pan-y"
        onPointerMove={follow}
        onPointerDown={follow}
        onPointerLeave={() => setPlace(undefined)}
      >
        <canvas ref={canvas} className="block w-full" style={{ height: layout.height }} />
      </div>
      <p className="min-h-5 text-13 text-ink-2">{place === undefined ? idle : describe(place)}</p>
    </div>
  );
}
