import { useEffect, useRef, useState } from 'react';
import { t } from '#src/lib/messages/t.ts';

const PAUSE_MS = 250;

export type SearchFieldProps = { readonly value: string; readonly onSearch: (text: string) => void };

/** Finds as one types, a moment after the last key; Escape empties it. */
export function SearchField({ value, onSearch }: SearchFieldProps) {
  const [text, setText] = useState(value);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  useEffect(() => setText(value), [value]);
  useEffect(() => () => clearTimeout(timer.current), []);
  const change = (next: string) => {
    setText(next);
    clearTimeout(timer.current);
    timer.current = setTimeout(() => onSearch(next.trim()), PAUSE_MS);
  };
  return (
    <input
      type="search"
      aria-label={t('fleet.searchLabel')}
      placeholder={t('fleet.search')}
      value={text}
      maxLength={100}
      onChange={(event) => change(event.target.value)}
      onKeyDown={(event) => event.key === 'Escape' && change('')}
      className="min-h-9 w-full rounded-control border border-ink-2 bg-sheet px-3 placeholder:text-ink-2 sm:w-64"
    />
  );
}
