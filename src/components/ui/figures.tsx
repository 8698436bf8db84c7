import { Fragment } from 'react';

const FIGURE = /(\d[\d.,:\u00a0]*\d|\d)/g;

/** A unit right behind its figure, which must not begin the next line alone. */
const UNIT = /^ (?:%|°[CF]|kWh|Wh|W|V|rpm|gpm|gal|gallons|m³\/h|m³|ft|m|psi|kPa|kg|hp|s|min|h|d)(?![\p{L}\p{N}])/u;

/** A sentence whose figures stand in the figures' own type, each with its unit on one line. */
export function Figures({ text }: { readonly text: string }) {
  const parts = text.split(FIGURE);
  return parts.map((part, index) => {
    if (index % 2 === 0) {
      const unit = index === 0 ? undefined : UNIT.exec(part)?.[0];
      // biome-ignore lint/suspicious/noArrayIndexKey: the parts of one sentence have no other name.
      return <Fragment key={index}>{unit === undefined ? part : part.slice(unit.length)}</Fragment>;
    }
    const unit = UNIT.exec(parts[index + 1] ?? '')?.[0];
    return (
      // biome-ignore lint/suspicious/noArrayIndexKey: as above.
      <span key={index} className="whitespace-nowrap">
        <span className="figures">{part}</span>
        {unit}
      </span>
    );
  });
}
