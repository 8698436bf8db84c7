import { type ReactNode, useState } from 'react';

/** The table behind a picture, one click away; it is built only when somebody wants it. */
export function TableToggle({ label, children }: { readonly label: string; readonly children: ReactNode }) {
  const [open, setOpen] = useState(false);
  return (
    <details open={open} onToggle={(event) => setOpen(event.currentTarget.open)} className="pt-2">
      <summary className="inline-flex min-h-6 items-center text-13 text-ink-2 underline underline-offset-2">
        {label}
      </summary>
      {open ? <div className="pt-2">{children}</div> : null}
    </details>
  );
}
