import { useId } from 'react';

export type SelectProps<Value extends string> = {
  readonly label: string;
  readonly value: Value;
  readonly options: readonly { readonly value: Value; readonly label: string }[];
  readonly onChange: (value: Value) => void;
  /** Its values say what it is: the label is for the ear alone. */
  readonly quiet?: boolean;
};

/** One of many, with its label in front. */
export function Select<Value extends string>({ label, value, options, onChange, quiet = false }: SelectProps<Value>) {
  const id = useId();
  return (
    <span className="inline-flex min-h-8 min-w-0 max-w-full items-center gap-2 text-ink-2">
      <label htmlFor={id} className={quiet ? 'sr-only' : undefined}>
        {label}
      </label>
      <select
        id={id}
        value={value}
        onChange={(event) => {
          const chosen = options.find((option) => option.value === event.target.value);
          if (chosen !== undefined) onChange(chosen.value);
        }}
        className="min-h-8 min-w-0 max-w-64 rounded-control border border-ink-2 bg-sheet px-2 text-ink"
      >
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </span>
  );
}
