import { useFormat } from '#src/hooks/use-format.ts';
import { axisLabel } from './axis-label.ts';
import type { HandleBox } from './handle-box.ts';
import type { StripWindow } from './strip-run.ts';
import { listTicks } from './strip-ticks.ts';

export type StripAxisProps = {
  readonly window: StripWindow;
  readonly zone: string;
  readonly width: number;
  /** Where another label stands already: ticks keep clear of it. */
  readonly clearOf?: HandleBox | undefined;
};

/** Room for "midnight" and a little air, px. */
const LABEL_APART = 84;
const LABEL_ROOM = 4;

/** The times under or over a strip. Decoration for the ear: the cursor says the time. */
export function StripAxis({ window, zone, width, clearOf }: StripAxisProps) {
  const format = useFormat();
  const isClear = (x: number) =>
    clearOf === undefined || x + LABEL_APART * 0.8 < clearOf.left || x > clearOf.right + LABEL_ROOM;
  return (
    <div aria-hidden="true" className="figures relative h-full text-13 text-ink-2">
      {listTicks(window, zone, width, LABEL_APART)
        .filter(({ x }) => x + LABEL_APART / 2 < width && isClear(x))
        .map(({ at, x, minute }) => (
          <span key={at} className="absolute bottom-1.5 whitespace-nowrap pl-1" style={{ left: x }}>
            {axisLabel({ at, minute }, window, zone, format)}
          </span>
        ))}
    </div>
  );
}
