import { type PointerEvent, useCallback, useRef } from 'react';
import type { StripWindow } from './strip-run.ts';
import { instantAt } from './strip-scale.ts';
import type { CursorStore } from './time-cursor.tsx';

/**
 * Pointer handlers that set the cursor from where the pointer is over the element that carries `data-track`. However
 * fast a pointer moves, the cursor moves once a frame.
 */
export function usePointerInstant(cursor: CursorStore, window: StripWindow) {
  const frame = useRef(0);
  const onPointerMove = useCallback(
    ({ currentTarget, clientX }: PointerEvent<HTMLElement>) => {
      cancelAnimationFrame(frame.current);
      frame.current = requestAnimationFrame(() => {
        const track = currentTarget.querySelector('[data-track]') ?? currentTarget;
        const { left, width, right } = track.getBoundingClientRect();
        const inside = clientX >= left && clientX <= right;
        cursor.set(inside ? instantAt(window, width, clientX - left) : undefined);
      });
    },
    [cursor, window],
  );
  const onPointerLeave = useCallback(() => {
    cancelAnimationFrame(frame.current);
    cursor.set(undefined);
  }, [cursor]);
  return { onPointerMove, onPointerLeave, onPointerDown: onPointerMove };
}
