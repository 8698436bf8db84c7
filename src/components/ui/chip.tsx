import type { ComponentProps } from 'react';
import { classNames } from '#src/lib/class-names.ts';

const BASE =
  'inline-flex min-h-8 items-center gap-1.5 whitespace-nowrap rounded-control border bg-sheet px-2.5 transition-colors hover:bg-wash';
/** The stroke under what is on takes the room that what is off leaves free: names stay on one line. */
const ON = 'border-ink border-b-3 text-ink';
const OFF = 'border-rule-strong border-b pb-0.5 text-ink-2 hover:text-ink';

/** How a filter looks, for links and buttons alike: ink under it when it is on. */
export const chipClass = (on: boolean): string => classNames(BASE, on ? ON : OFF);

export type ChipProps = ComponentProps<'button'> & { readonly on: boolean };

export function Chip({ on, className, ...rest }: ChipProps) {
  return <button type="button" aria-pressed={on} className={classNames(chipClass(on), className)} {...rest} />;
}
