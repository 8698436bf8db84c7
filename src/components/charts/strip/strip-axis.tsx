import { useFormat } from '#src/hooks/use-format.ts';
import { axisLabel } from './axis-label.ts';
import type { StripWindow } from './strip-run.ts';
import { listTicks } from './strip-ticks.ts';

export type StripAxisProps = {
  readonly window: StripWindow;
  readonly zone: string;
  readonly width: number;
};

/** Room for "midnight" and a little air, px. */
const LABEL_APART = 84;

/** The times under or over a strip. Decoration for the ear: the cursor says the time. */
export function StripAxis({ window, zone, width }: StripAxisProps) {
  const format = useFormat();
  return (
    <div aria-hidden="true" className="figures relative h-full text-13 text-ink-2">
      {listTicks(window, zone, width, LABEL_APART)
        .filter(({ x }) => x + LABEL_APART / 2 < width)
        .map(({ at, x, hour }) => (
          <span key={at} className="absolute bottom-1.5 whitespace-nowrap pl-1" style={{ left: x }}>
            {axisLabel({ at, hour }, window, zone, format)}
          </span>
        ))}
    </div>
  );
}
