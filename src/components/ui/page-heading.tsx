import type { ReactNode } from 'react';
import { useDocumentTitle } from '#src/hooks/use-document-title.ts';

export type PageHeadingProps = {
  /** What the tab and a screen reader are told. */
  readonly title: string;
  /** The fact as a sentence, where it is more than the title. */
  readonly children?: ReactNode;
  readonly size?: 'large' | 'usual';
};

/** The one first heading of a page. It takes the focus when the page opens, so that a screen reader says where one is. */
export function PageHeading({ title, children, size = 'usual' }: PageHeadingProps) {
  useDocumentTitle(title);
  return (
    <h1
      tabIndex={-1}
      className={`max-w-[44em] text-balance font-semibold tracking-[-0.012em] ${size === 'large' ? 'text-27 sm:text-34' : 'text-27'}`}
    >
      {children ?? title}
    </h1>
  );
}
