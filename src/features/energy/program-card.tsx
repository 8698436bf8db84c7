import { Link } from 'react-router-dom';
import type { ProgramRow } from '#shared/contract/http/energy-programs.ts';
import { Figures } from '#src/components/ui/figures.tsx';
import { useFormat } from '#src/hooks/use-format.ts';
import { t } from '#src/lib/messages/energy-words.ts';
import { paths } from '#src/lib/paths.ts';
import { DearHours } from './dear-hours.tsx';
import { ProgramComparison } from './program-comparison.tsx';
import { programHeading } from './program-view.ts';

/** One pump whose program or clocks cost more than they must: what, how much, and the week before and after. */
export function ProgramCard({ row }: { readonly row: ProgramRow }) {
  const format = useFormat();
  const name = row.pumpName === '' ? row.padName : t('alarm.where', { pad: row.padName, pump: row.pumpName });
  return (
    <article className="flex flex-col gap-2 border-t border-rule px-4 py-4 first:border-0 sm:px-5">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <h3 className="text-17 font-semibold">
          <Link to={paths.pump(row.pumpId)} className="underline underline-offset-2 hover:bg-wash">
            {name}
          </Link>
        </h3>
        <span className="text-ink-2">
          {[row.customerName, row.tariffName].filter((part) => part !== null).join(' · ')}
        </span>
      </div>
      <p>
        <Figures text={programHeading(row, format)} />
      </p>
      <DearHours dearHours={row.dearHours} currency={row.currency} />
      {row.before === null ? null : (
        <ProgramComparison name={name} before={row.before} after={row.after} currency={row.currency} />
      )}
    </article>
  );
}
