import type { AlarmHealthFigures } from '#shared/contract/http/alarm-health.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { ExportButton } from '#src/components/ui/export-button.tsx';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/health-words.ts';

type Seen = AlarmHealthFigures['acknowledging'][number];

const minutes = (ms: number | null) => (ms === null ? null : Math.round(ms / 6_000) / 10);

const exportRows = (rows: readonly Seen[]) => [
  [
    t('health.seen.priority'),
    t('health.seen.count'),
    `${t('health.seen.median')}, min`,
    `${t('health.seen.slow')}, min`,
    `${t('health.seen.limit')}, min`,
    t('health.seen.inTime'),
    t('health.seen.escalated'),
    t('health.seen.waiting'),
  ],
  ...rows.map((row) => [
    row.priority,
    row.count,
    minutes(row.medianMs),
    minutes(row.slowMs),
    minutes(row.limitMs),
    row.inTime,
    row.escalated,
    row.waiting,
  ]),
];

/** How long alarms wait until somebody says that they have seen them. */
export function SeenSheet({ acknowledging }: { readonly acknowledging: readonly Seen[] }) {
  const format = useFormat();
  const span = (ms: number | null) => (ms === null ? '–' : format.span(ms));
  const count = (value: number | null) => (value === null ? '–' : format.number(value));
  return (
    <Sheet
      id="seen"
      title={t('health.seen')}
      aside={<ExportButton name="alarms-seen" rows={() => exportRows(acknowledging)} />}
    >
      <div className="px-4 py-3 sm:px-5">
        <DataTable
          wide
          caption={t('health.seen')}
          rows={acknowledging}
          keyOf={({ priority }) => priority}
          columns={[
            { head: t('health.seen.priority'), cell: ({ priority }: Seen) => t(`mark.${priority}`) },
            { head: t('health.seen.count'), figures: true, right: true, cell: (row) => count(row.count) },
            { head: t('health.seen.median'), figures: true, right: true, cell: (row) => span(row.medianMs) },
            { head: t('health.seen.slow'), figures: true, right: true, cell: (row) => span(row.slowMs) },
            { head: t('health.seen.limit'), figures: true, right: true, cell: (row) => span(row.limitMs) },
            { head: t('health.seen.inTime'), figures: true, right: true, cell: (row) => count(row.inTime) },
            { head: t('health.seen.escalated'), figures: true, right: true, cell: (row) => count(row.escalated) },
            { head: t('health.seen.waiting'), figures: true, right: true, cell: (row) => count(row.waiting) },
          ]}
        />
      </div>
    </Sheet>
  );
}
