import { useElementWidth } from '#src/hooks/use-element-width.ts';
import { useFormat } from '#src/hooks/use-format.ts';
import { handleBox, restingAt } from './handle-box.ts';
import { StripAxis } from './strip-axis.tsx';
import { StripCanvas, type StripCanvasProps } from './strip-canvas.tsx';
import { STRIP_METRICS } from './strip-metrics.ts';
import { CursorHandle, CursorLine, type CursorStore } from './time-cursor.tsx';
import { usePointerInstant } from './use-pointer-instant.ts';

export type DayStripProps = Omit<StripCanvasProps, 'width'> & {
  readonly cursor: CursorStore;
  /** What the picture is of, for those who do not see it. */
  readonly name: string;
  /** What a screen reader is told of an instant. */
  readonly describe: (at: number) => string;
  /** Whether speeds stand at the left; a chart below keeps the same room. */
  readonly scaled?: boolean;
};

/** A strip large enough to read: the canvas, its times, its speeds, and a cursor for pointer and keyboard. */
export function DayStrip({ cursor, name, describe, scaled = false, ...strip }: DayStripProps) {
  const format = useFormat();
  const [track, width] = useElementWidth<HTMLDivElement>();
  const pointer = usePointerInstant(cursor, strip.window);
  const resting = restingAt(strip.now, strip.window);
  const { base, top } = STRIP_METRICS[strip.size];
  const shares = scaled ? [1, 2 / 3, 1 / 3] : [];
  return (
    <div className={`relative touch-pan-y ${scaled ? 'pl-14' : ''}`} {...pointer}>
      {shares.map((share) => (
        <span
          key={share}
          aria-hidden="true"
          className="figures absolute left-0 w-12 -translate-y-1/2 text-right text-13 text-ink-2"
          style={{ top: base - share * (base - top) }}
        >
          {format.number(strip.topRpm * share)}
        </span>
      ))}
      <div ref={track} data-track className="relative">
        <div role="img" aria-label={name}>
          <StripCanvas {...strip} width={width} />
        </div>
        <CursorLine cursor={cursor} window={strip.window} />
        <div className="relative h-8">
          <StripAxis
            window={strip.window}
            zone={strip.zone}
            width={width}
            clearOf={handleBox(resting, strip.window, width, format.time(resting, strip.zone).length)}
          />
          <CursorHandle
            cursor={cursor}
            window={strip.window}
            now={strip.now}
            width={width}
            textOf={(at) => format.time(at, strip.zone)}
            describe={describe}
            className="top-1"
          />
        </div>
      </div>
    </div>
  );
}
