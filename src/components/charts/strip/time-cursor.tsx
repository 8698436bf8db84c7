import { type KeyboardEvent, useEffect, useRef } from 'react';
import { useStore } from '#src/hooks/use-store.ts';
import { classNames } from '#src/lib/class-names.ts';
import { t } from '#src/lib/messages/t.ts';
import type { Store } from '#src/lib/store.ts';
import { moveCursor } from './cursor-keys.ts';
import { handleBox, restingAt } from './handle-box.ts';
import type { StripWindow } from './strip-run.ts';

/** The instant everybody on the page is asked about; undefined when nobody points at one. */
export type CursorStore = Store<number | undefined>;

/** The hair line over one or many strips. It moves without rendering anything again. */
export function CursorLine({ cursor, window }: { readonly cursor: CursorStore; readonly window: StripWindow }) {
  const line = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const place = () => {
      const at = cursor.get();
      const element = line.current;
      if (element === null) return;
      const seen = at !== undefined && at >= window.from && at < window.until;
      element.style.display = seen ? '' : 'none';
      if (seen) element.style.left = `${((at - window.from) / (window.until - window.from)) * 100}%`;
    };
    place();
    return cursor.subscribe(place);
  }, [cursor, window]);
  return <div ref={line} aria-hidden="true" className="pointer-events-none absolute inset-y-0 z-10 w-px bg-focus" />;
}

export type CursorHandleProps = {
  readonly cursor: CursorStore;
  readonly window: StripWindow;
  readonly now: number;
  /** Of the track, px: the handle turns to the left before it leaves it. */
  readonly width: number;
  /** What a screen reader is told of an instant, and what stands on the handle. */
  readonly describe: (at: number) => string;
  readonly textOf: (at: number) => string;
  readonly className?: string;
};

/** The cursor's time, and the handle that the keyboard moves it by. Shows now when nobody points anywhere. */
export function CursorHandle({ cursor, window, now, width, describe, textOf, className }: CursorHandleProps) {
  const chosen = useStore(cursor);
  const start = restingAt(now, window);
  const at = chosen ?? start;
  const text = textOf(at);
  const { x, left } = handleBox(at, window, width, text.length);
  const move = (event: KeyboardEvent) => {
    if (event.key === 'Escape') return cursor.set(undefined);
    const target = moveCursor(event.key, event.shiftKey, chosen, window, start);
    if (target === undefined) return;
    event.preventDefault();
    cursor.set(target);
  };
  return (
    <div
      role="slider"
      tabIndex={0}
      aria-label={t('strip.cursor')}
      aria-orientation="horizontal"
      aria-valuemin={window.from}
      aria-valuemax={window.until}
      aria-valuenow={at}
      aria-valuetext={describe(at)}
      onKeyDown={move}
      onBlur={() => cursor.set(undefined)}
      className={classNames(
        'figures absolute z-10 flex min-h-6 items-center whitespace-nowrap px-1.5 text-13',
        chosen === undefined ? 'bg-ink text-sheet' : 'bg-focus text-sheet',
        className,
      )}
      style={{
        left: x,
        transform: `translateX(${left < x ? '-100%' : '0'})`,
      }}
    >
      {text}
    </div>
  );
}
