import type { RunSourceName } from '#shared/contract/http/runs.ts';
import { listClosed } from '#src/lib/list-closed.ts';
import { t } from '#src/lib/messages/t.ts';
import type { StripRun } from './strip-run.ts';

/** What commands a run, in a few words. */
export function describeSource(run: {
  readonly source: RunSourceName;
  readonly closedInputs: number;
  readonly activeInput: number;
}): string {
  if (run.source !== 'input') return t(`strip.source.${run.source}`);
  const others = listClosed(run.closedInputs).filter((input) => input !== run.activeInput);
  return others.length === 0
    ? t('strip.source.input', { input: run.activeInput })
    : t('strip.source.inputs', { input: run.activeInput, others: others.join(', ') });
}

/** Rows of the strip's table, the latest first. */
export const newestFirst = (runs: readonly StripRun[]): StripRun[] => [...runs].sort((a, b) => b.from - a.from);
