import type { ComponentProps } from 'react';
import { classNames } from '#src/lib/class-names.ts';

/** `main` = the one thing to do here; `plain` = beside it; `touch` = 48 px high, for a hand that also holds a tool. */
export type ButtonProps = ComponentProps<'button'> & {
  readonly look?: 'main' | 'plain' | 'quiet';
  readonly touch?: boolean;
};

const LOOKS = {
  main: 'border-ink bg-ink text-sheet hover:bg-ink-2 disabled:bg-ink-2',
  plain: 'border-ink bg-sheet text-ink hover:bg-wash disabled:text-ink-2',
  quiet: 'border-transparent bg-transparent text-ink underline underline-offset-2 hover:bg-wash',
};

export const buttonClass = (look: keyof typeof LOOKS = 'plain', touch = false): string =>
  classNames(
    'inline-flex items-center justify-center gap-2 rounded-control border font-semibold transition-colors',
    touch ? 'min-h-touch px-5 text-17' : 'min-h-8 px-3 text-15',
    LOOKS[look],
  );

export function Button({ look = 'plain', touch = false, className, type = 'button', ...rest }: ButtonProps) {
  return <button type={type} className={classNames(buttonClass(look, touch), className)} {...rest} />;
}
