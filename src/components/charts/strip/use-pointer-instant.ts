import { type PointerEvent, useCallback } from 'react';
import type { StripWindow } from './strip-run.ts';
import { instantAt } from './strip-scale.ts';
import type { CursorStore } from './time-cursor.tsx';

/** Pointer handlers that set the cursor from where the pointer is over the element that carries `data-track`. */
export function usePointerInstant(cursor: CursorStore, window: StripWindow) {
  const onPointerMove = useCallback(
    (event: PointerEvent<HTMLElement>) => {
      const track = event.currentTarget.querySelector('[data-track]') ?? event.currentTarget;
      const { left, width, right } = track.getBoundingClientRect();
      const inside = event.clientX >= left && event.clientX <= right;
      cursor.set(inside ? instantAt(window, width, event.clientX - left) : undefined);
    },
    [cursor, window],
  );
  const onPointerLeave = useCallback(() => cursor.set(undefined), [cursor]);
  return { onPointerMove, onPointerLeave, onPointerDown: onPointerMove };
}
