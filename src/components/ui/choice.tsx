import { useId } from 'react';

export type ChoiceProps<Value extends string> = {
  readonly legend: string;
  readonly value: Value;
  readonly options: readonly { readonly value: Value; readonly label: string; readonly hint?: string }[];
  readonly onChange: (value: Value) => void;
};

/** One of a few, all of them in sight. */
export function Choice<Value extends string>({ legend, value, options, onChange }: ChoiceProps<Value>) {
  const name = useId();
  return (
    <fieldset className="flex flex-col gap-1">
      <legend className="mb-1 font-semibold">{legend}</legend>
      {options.map((option) => (
        <label key={option.value} className="flex min-h-9 items-center gap-3">
          <input
            type="radio"
            name={name}
            className="size-5 accent-ink"
            checked={option.value === value}
            onChange={() => onChange(option.value)}
          />
          <span>
            {option.label}
            {option.hint === undefined ? null : <span className="text-ink-2"> {option.hint}</span>}
          </span>
        </label>
      ))}
    </fieldset>
  );
}
