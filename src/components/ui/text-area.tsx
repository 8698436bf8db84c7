import { type ComponentProps, useId } from 'react';

export type TextAreaProps = ComponentProps<'textarea'> & {
  readonly label: string;
  readonly hint?: string | undefined;
  readonly error?: string | undefined;
};

/** A labelled field for some lines; its error stands under it and is tied to it. */
export function TextArea({ label, hint, error, ...rest }: TextAreaProps) {
  const id = useId();
  const described = [hint === undefined ? '' : `${id}-hint`, error === undefined ? '' : `${id}-error`].join(' ').trim();
  return (
    <div className="flex flex-col gap-1">
      <label htmlFor={id} className="font-medium">
        {label}
      </label>
      <textarea
        id={id}
        rows={3}
        aria-invalid={error === undefined ? undefined : true}
        aria-describedby={described === '' ? undefined : described}
        className="rounded-control border border-ink-2 bg-sheet px-3 py-2 text-17 text-ink aria-invalid:border-p1"
        {...rest}
      />
      {hint === undefined ? null : (
        <p id={`${id}-hint`} className="text-13 text-ink-2">
          {hint}
        </p>
      )}
      {error === undefined ? null : (
        <p id={`${id}-error`} role="alert" className="text-13 font-medium text-p1">
          {error}
        </p>
      )}
    </div>
  );
}
