import { Fragment } from 'react';

const FIGURE = /(\d[\d.,:\u00a0]*\d|\d)/g;

/** A sentence whose figures stand in the figures' own type. */
export function Figures({ text }: { readonly text: string }) {
  return text.split(FIGURE).map((part, index) =>
    index % 2 === 1 ? (
      // biome-ignore lint/suspicious/noArrayIndexKey: the parts of one sentence have no other name.
      <span key={index} className="figures">
        {part}
      </span>
    ) : (
      // biome-ignore lint/suspicious/noArrayIndexKey: as above.
      <Fragment key={index}>{part}</Fragment>
    ),
  );
}
