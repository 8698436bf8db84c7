import type { ReactNode } from 'react';
import { classNames } from '#src/lib/class-names.ts';

export type SheetProps = {
  readonly title?: ReactNode;
  /** Stands at the right of the title: a date, a count, a control. */
  readonly aside?: ReactNode;
  readonly children: ReactNode;
  readonly className?: string;
  readonly id?: string;
};

/** A sheet of paper on the desk: an ink frame, a caption, what is on it. */
export function Sheet({ title, aside, children, className, id }: SheetProps) {
  const heading = id === undefined ? undefined : `${id}-title`;
  return (
    <section
      id={id}
      aria-labelledby={title === undefined ? undefined : heading}
      className={classNames('border border-ink bg-sheet', className)}
    >
      {title === undefined ? null : (
        <div className="flex min-h-11 flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-rule px-4 py-2 sm:px-5">
          <h2 id={heading} className="text-15 font-semibold">
            {title}
          </h2>
          {aside}
        </div>
      )}
      {children}
    </section>
  );
}
