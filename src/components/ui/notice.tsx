import type { ReactNode } from 'react';

export type NoticeProps = {
  /** What is the case, as a sentence. */
  readonly title: string;
  /** What it means and what to do. */
  readonly children?: ReactNode;
  /** Buttons and links. */
  readonly actions?: ReactNode;
  /** `trouble` is read out at once. */
  readonly kind?: 'quiet' | 'trouble';
};

/** An empty, failed or forbidden place: what is the case, what it means, what to do. */
export function Notice({ title, children, actions, kind = 'quiet' }: NoticeProps) {
  return (
    <div
      role={kind === 'trouble' ? 'alert' : undefined}
      className="flex max-w-2xl flex-col items-start gap-3 px-5 py-6"
    >
      <p className="text-17 font-semibold">{title}</p>
      {children === undefined ? null : <div className="text-ink-2">{children}</div>}
      {actions === undefined ? null : <div className="flex flex-wrap gap-2">{actions}</div>}
    </div>
  );
}
