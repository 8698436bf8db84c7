import { type ComponentProps, useId } from 'react';
import { classNames } from '#src/lib/class-names.ts';

export type FieldProps = ComponentProps<'input'> & {
  readonly label: string;
  readonly hint?: string | undefined;
  readonly error?: string | undefined;
};

/** A labelled text field; its error stands under it and is tied to it. */
export function Field({ label, hint, error, className, ...rest }: FieldProps) {
  const id = useId();
  const described = [hint === undefined ? '' : `${id}-hint`, error === undefined ? '' : `${id}-error`].join(' ').trim();
  return (
    <div className={classNames('flex flex-col gap-1', className)}>
      <label htmlFor={id} className="font-medium">
        {label}
      </label>
      <input
        id={id}
        aria-invalid={error === undefined ? undefined : true}
        aria-describedby={described === '' ? undefined : described}
        className="min-h-11 rounded-control border border-ink-2 bg-sheet px-3 text-17 text-ink aria-invalid:border-p1"
        {...rest}
      />
      {hint === undefined ? null : (
        <p id={`${id}-hint`} className="text-13 text-ink-2">
          {hint}
        </p>
      )}
      {error === undefined ? null : (
        <p id={`${id}-error`} className="text-13 font-medium text-p1">
          {error}
        </p>
      )}
    </div>
  );
}
