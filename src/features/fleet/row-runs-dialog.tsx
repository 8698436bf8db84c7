import type { Run } from '#shared/contract/http/runs.ts';
import { RunTable } from '#src/components/charts/strip/run-table.tsx';
import { Dialog } from '#src/components/ui/dialog.tsx';
import { t } from '#src/lib/messages/t.ts';

export type RowRunsDialogProps = {
  readonly name: string;
  readonly runs: readonly Run[] | undefined;
  readonly zone: string;
  readonly now: number;
  readonly onClose: () => void;
};

/** The table behind a row's strip, in the pad's own time. */
export function RowRunsDialog({ name, runs, zone, now, onClose }: RowRunsDialogProps) {
  const title = t('strip.tableOf', { name });
  return (
    <Dialog title={title} onClose={onClose}>
      <RunTable runs={runs} zone={zone} now={now} caption={title} />
    </Dialog>
  );
}
