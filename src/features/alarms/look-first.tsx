import type { Look } from '#shared/domain/wording/alarm-wording.data.ts';
import { Sheet } from '#src/components/ui/sheet.tsx';
import { t } from '#src/lib/messages/page-words.ts';

/** What to look at, in order, before anything is switched off. */
export function LookFirst({ look }: { readonly look: readonly Look[] }) {
  return (
    <Sheet id="look" title={t('alarm.look')}>
      <ol className="px-4 sm:px-5">
        {look.map(({ what, why }, index) => (
          <li
            key={what}
            className="grid grid-cols-[30px_minmax(0,1fr)] gap-x-2 border-t border-rule py-2.5 first:border-0"
          >
            <span aria-hidden="true" className="figures text-17 font-semibold">
              {index + 1}
            </span>
            <div>
              <p className="text-17">{what}</p>
              <p className="text-ink-2">{why}</p>
            </div>
          </li>
        ))}
      </ol>
    </Sheet>
  );
}
