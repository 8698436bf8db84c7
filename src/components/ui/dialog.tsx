import { type ReactNode, useEffect, useRef } from 'react';
import { t } from '#src/lib/messages/t.ts';
import { Button } from './button.tsx';

export type DialogProps = { readonly title: string; readonly onClose: () => void; readonly children: ReactNode };

/** A sheet laid over the page. Escape and the button close it; the focus goes back to where it was. */
export function Dialog({ title, onClose, children }: DialogProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  useEffect(() => {
    const element = dialog.current;
    element?.showModal();
    return () => element?.close();
  }, []);
  return (
    <dialog
      ref={dialog}
      aria-label={title}
      onClose={onClose}
      className="m-auto max-h-[85dvh] w-[min(56rem,calc(100vw-2rem))] border border-ink bg-sheet p-0 text-ink"
    >
      <div className="sticky top-0 z-10 flex items-center justify-between gap-4 border-b border-rule bg-sheet px-5 py-3">
        <h2 className="text-17 font-semibold">{title}</h2>
        <Button onClick={() => dialog.current?.close()}>{t('strip.close')}</Button>
      </div>
      <div className="px-5 py-4">{children}</div>
    </dialog>
  );
}
