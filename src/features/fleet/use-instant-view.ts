import { useSyncExternalStore } from 'react';
import type { PumpRow } from '#shared/contract/http/pumps.ts';
import type { Run } from '#shared/contract/http/runs.ts';
import { runAt, type StripWindow } from '#src/components/charts/strip/strip-run.ts';
import type { CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/t.ts';
import { whyThenShort } from '#src/lib/why/why.ts';

export type InstantView = {
  readonly line: string;
  readonly rpm: string;
  readonly watts: string;
  /** Somebody points at the instant; otherwise it is the end of a stretch of the past. */
  readonly pointed: boolean;
};

const NO_FIGURE = '–';

type Asked = {
  readonly row: PumpRow;
  /** Undefined until they have come. */
  readonly runs: readonly Run[] | undefined;
  readonly window: StripWindow;
  readonly cursor: CursorStore;
  readonly now: number;
};

/**
 * What a row says of the instant under the cursor, or of the end of a stretch that lies in the past: what a pump does
 * now has no place beside a day gone by. Undefined when the row is to say what is now. It renders again only when the
 * cursor enters another run.
 */
export function useInstantView({ row, runs, window, cursor, now }: Asked): InstantView | undefined {
  const format = useFormat();
  const isPast = now >= window.until;
  const instant = () => cursor.get() ?? (isPast ? window.until - 1 : undefined);
  const run = useSyncExternalStore(cursor.subscribe, () => {
    const at = instant();
    return at === undefined ? undefined : runAt(runs ?? [], at, now);
  });
  const at = instant();
  const pointed = cursor.get() !== undefined;
  if (at === undefined) return undefined;
  if (run === undefined) {
    const line = runs === undefined ? '' : t('strip.empty');
    return isPast ? { line, rpm: NO_FIGURE, watts: NO_FIGURE, pointed } : undefined;
  }
  const unseen = run.source === 'no-data';
  return {
    line: whyThenShort(run, at, row, format),
    rpm: unseen ? NO_FIGURE : format.number(run.meanRpm),
    watts: unseen ? NO_FIGURE : format.number(run.meanWatts),
    pointed,
  };
}
