import type { ReactNode } from 'react';

/** Names and values, one pair a line. */
export function FactList({ facts }: { readonly facts: readonly (readonly [name: string, value: ReactNode])[] }) {
  return (
    <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-5 gap-y-1.5">
      {facts.map(([name, value]) => (
        <div key={name} className="contents">
          <dt className="text-ink-2">{name}</dt>
          <dd>{value}</dd>
        </div>
      ))}
    </dl>
  );
}
