import { type ReactNode, useId, useState } from 'react';
import { t } from '#src/lib/messages/t.ts';
import { chipClass } from './chip.tsx';

export type FoldedProps = {
  readonly label: string;
  /** How many of the controls inside are set: said on the fold, so that nothing narrows a list unseen. */
  readonly count: number;
  readonly children: ReactNode;
};

/** Controls that are all in sight where there is room, and behind one button on a phone. */
export function Folded({ label, count, children }: FoldedProps) {
  const [open, setOpen] = useState(false);
  const id = useId();
  return (
    <>
      <button
        type="button"
        aria-expanded={open}
        aria-controls={id}
        onClick={() => setOpen(!open)}
        className={`sm:hidden ${chipClass(open)}`}
      >
        {count === 0 ? label : t('fold.count', { label, count })}
      </button>
      <div id={id} className={`${open ? 'flex' : 'hidden'} flex-wrap items-center gap-1.5 sm:contents`}>
        {children}
      </div>
    </>
  );
}
