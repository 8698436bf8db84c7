import { useFormat } from '#src/hooks/use-format.ts';
import { axisLabel } from './axis-label.ts';
import type { StripWindow } from './strip-run.ts';
import { listTicks } from './strip-ticks.ts';

export type StripAxisProps = {
  readonly window: StripWindow;
  readonly zone: string;
  readonly width: number;
  /** An instant whose own label stands on the axis already: ticks keep clear of it. */
  readonly clearOf?: number | undefined;
};

/** Room for "midnight" and a little air, px. */
const LABEL_APART = 84;

/** The times under or over a strip. Decoration for the ear: the cursor says the time. */
export function StripAxis({ window, zone, width, clearOf }: StripAxisProps) {
  const format = useFormat();
  const taken = clearOf === undefined ? undefined : ((clearOf - window.from) / (window.until - window.from)) * width;
  return (
    <div aria-hidden="true" className="figures relative h-full text-13 text-ink-2">
      {listTicks(window, zone, width, LABEL_APART)
        .filter(
          ({ x }) => x + LABEL_APART / 2 < width && (taken === undefined || Math.abs(x - taken) > LABEL_APART * 0.8),
        )
        .map(({ at, x, hour }) => (
          <span key={at} className="absolute bottom-1.5 whitespace-nowrap pl-1" style={{ left: x }}>
            {axisLabel({ at, hour }, window, zone, format)}
          </span>
        ))}
    </div>
  );
}
