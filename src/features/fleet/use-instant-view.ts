import { useSyncExternalStore } from 'react';
import type { PumpRow } from '#shared/contract/http/pumps.ts';
import type { Run } from '#shared/contract/http/runs.ts';
import { runAt } from '#src/components/charts/strip/strip-run.ts';
import type { CursorStore } from '#src/components/charts/strip/time-cursor.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { whyThenShort } from '#src/lib/why/why.ts';

export type InstantView = { readonly line: string; readonly rpm: string; readonly watts: string };

const NO_FIGURE = '–';

/**
 * What a row says of the instant under the cursor; undefined when nobody points at one, or nothing is known of it.
 * The row renders again only when the cursor enters another run.
 */
export function useInstantView(
  row: PumpRow,
  runs: readonly Run[] | undefined,
  cursor: CursorStore,
  now: number,
): InstantView | undefined {
  const format = useFormat();
  const run = useSyncExternalStore(cursor.subscribe, () => {
    const at = cursor.get();
    return at === undefined ? undefined : runAt(runs ?? [], at, now);
  });
  const at = cursor.get();
  if (run === undefined || at === undefined) return undefined;
  const unseen = run.source === 'no-data';
  return {
    line: whyThenShort(run, at, row, format),
    rpm: unseen ? NO_FIGURE : format.number(run.meanRpm),
    watts: unseen ? NO_FIGURE : format.number(run.meanWatts),
  };
}
