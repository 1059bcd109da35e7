'use client';
import { useRef, type PointerEvent } from 'react';
import { type Brush, drawn, type Handle, handleAt, moved, placeAt } from './brush';
import type { Brushes, useBrushes } from './use-brushes';

/** How far beside an end a finger still takes it, px. */
const REACH_PX = 14;
/** Less is a slip, or a tap. */
const LEAST_DRAG_PX = 5;

interface Drag {
  which: keyof Brushes;
  handle: Handle | null;
  from: number;
  x: number;
  before: Brush | null;
  moved: boolean;
}

/** What a pointer does over the bars: it draws a brush, or takes an end or the whole of one and moves it. */
export function useDrawing({
  count,
  brushes,
  draft,
  commit,
}: { count: number } & Pick<ReturnType<typeof useBrushes>, 'brushes' | 'draft' | 'commit'>) {
  const drag = useRef<Drag | null>(null);

  const partOf = (event: PointerEvent<HTMLDivElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    return { part: (event.clientX - box.left) / box.width, reach: (REACH_PX / box.width) * count };
  };
  const onDown = (event: PointerEvent<HTMLDivElement>) => {
    if (event.button !== 0) return;
    const { part, reach } = partOf(event);
    const [from, x] = [placeAt(part, count), event.clientX];
    const taken = (['chosen', 'other'] as const).flatMap((which) => {
      const handle = brushes[which] === null ? null : handleAt(brushes[which], part * count - 0.5, reach);
      return handle === null ? [] : [{ which, handle }];
    })[0] ?? { which: 'chosen' as const, handle: null };
    drag.current = { ...taken, from, x, before: brushes[taken.which], moved: false };
    event.currentTarget.setPointerCapture(event.pointerId);
  };
  const onMove = (event: PointerEvent<HTMLDivElement>) => {
    const now = drag.current;
    if (now === null || (!now.moved && Math.abs(event.clientX - now.x) < LEAST_DRAG_PX)) return;
    now.moved = true;
    const at = placeAt(partOf(event).part, count);
    const next =
      now.handle === null || now.before === null
        ? drawn(now.from, at, count)
        : moved(now.before, now.handle, at - now.from, count);
    draft(now.which, next);
  };
  const onUp = () => {
    if (drag.current?.moved === true) commit();
    drag.current = null;
  };
  return { onPointerDown: onDown, onPointerMove: onMove, onPointerUp: onUp, onPointerCancel: onUp };
}
