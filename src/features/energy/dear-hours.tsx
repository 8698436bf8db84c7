import type { ProgramRow } from '#shared/contract/http/energy-programs.ts';
import { DataTable } from '#src/components/ui/data-table.tsx';
import { Figures } from '#src/components/ui/figures.tsx';
import { TableToggle } from '#src/components/ui/table-toggle.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { dearLine, nameOfCaller, nameOfMonthNumber } from './program-view.ts';

export type DearHoursProps = Pick<ProgramRow, 'dearHours' | 'currency'>;

/** What runs in dear hours and what that costs, by entry and by clock window. */
export function DearHours({ dearHours, currency }: DearHoursProps) {
  const format = useFormat();
  if (dearHours.length === 0) return null;
  const rows = dearHours.flatMap((dear) => dear.months.map((month) => ({ dear, ...month })));
  return (
    <div>
      <ul>
        {dearHours.map((dear) => (
          <li key={nameOfCaller(dear)}>
            <Figures text={dearLine(dear, currency, format)} />
          </li>
        ))}
      </ul>
      <TableToggle label={t('program.dear.table')}>
        <DataTable
          caption={t('program.dear.table')}
          rows={rows}
          keyOf={(_, index) => index}
          columns={[
            { head: t('program.dear.column.what'), cell: ({ dear }: (typeof rows)[number]) => nameOfCaller(dear) },
            {
              head: t('program.dear.column.month'),
              cell: ({ month }) => nameOfMonthNumber(month, format.locale),
            },
            {
              head: t('program.dear.column.minutes'),
              figures: true,
              right: true,
              cell: ({ minutesPerWeek }) => format.number(minutesPerWeek),
            },
            {
              head: t('program.dear.column.extra'),
              figures: true,
              right: true,
              cell: ({ extraPerWeek }) => format.money(extraPerWeek, currency),
            },
          ]}
        />
      </TableToggle>
    </div>
  );
}
