'use client';
import { useRef, type PointerEvent } from 'react';
import { addressOf, type DutyAddress } from './address';
import { againstText } from './against';
import { type Brush, drawn, type Handle, handleAt, moved, placeAt } from './brush';
import { BrushEnds } from './brush-ends';
import { BARS_HIGH, type OverviewTick } from './overview-layout';
import { useBrushes } from './use-brushes';

export interface OverviewProps {
  house: string;
  address: DutyAddress;
  /** Names, ascending. */
  nights: string[];
  bars: { bars: string; zero: number };
  ticks: OverviewTick[];
  /** What the bars are as high as. */
  of: string;
  chosen: Brush | null;
  /** Nights of the same source that the chosen ones are compared with by a brush of their own. */
  other: Brush | null;
}

type Which = 'chosen' | 'other';
/** How far beside an end a finger still takes it, px. */
const REACH_PX = 14;
/** Less is a slip, or a tap. */
const LEAST_DRAG_PX = 5;

interface Drag {
  which: Which;
  handle: Handle | null;
  from: number;
  x: number;
  before: Brush | null;
  moved: boolean;
}

/** All nights as bars, over which some are chosen: by drawing over them, or with the ends as sliders. */
export function Overview(props: OverviewProps) {
  const { house, address, nights, bars, ticks, of } = props;
  const count = nights.length;
  const { brushes, draft, commit } = useBrushes(props, (next) => {
    const change: Partial<DutyAddress> = { night: undefined };
    const { chosen, other } = next;
    change.from = chosen === null ? undefined : nights[chosen.first];
    change.to = chosen === null ? undefined : nights[chosen.last];
    const [from, to] = other === null ? [] : [nights[other.first], nights[other.last]];
    if (from !== undefined && to !== undefined) change.against = againstText({ kind: 'nights', from, to });
    return addressOf(house, address, change);
  });
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

  return (
    <div role="group" aria-label="Choose nights" className="not-on-paper">
      <p className="flex justify-between gap-4 pb-1 text-[0.85rem] text-soft">
        <span>{of}</span>
        <span className="max-sm:hidden">draw over some nights to choose them</span>
      </p>
      <div
        className="relative h-12 cursor-crosshair touch-pan-y select-none border-b border-line"
        onPointerDown={onDown}
        onPointerMove={onMove}
        onPointerUp={onUp}
        onPointerCancel={onUp}
      >
        <svg
          aria-hidden="true"
          viewBox={`0 0 ${count} ${BARS_HIGH}`}
          preserveAspectRatio="none"
          className="absolute inset-0 size-full"
        >
          <path d={bars.bars} className="fill-ember" />
          <path d={`M0 ${bars.zero}h${count}`} vectorEffect="non-scaling-stroke" className="stroke-line" />
        </svg>
        <BrushEnds which="other" brush={brushes.other} nights={nights} onMove={draft} onDone={commit} />
        <BrushEnds which="chosen" brush={brushes.chosen} nights={nights} onMove={draft} onDone={commit} />
      </div>
      <p aria-hidden="true" className="relative h-5 font-mono text-[0.75rem] text-soft">
        {ticks.map((tick) => (
          <span
            key={tick.left}
            className="absolute -translate-x-1/2 whitespace-nowrap"
            style={{ left: `${tick.left}%` }}
          >
            {tick.label}
          </span>
        ))}
      </p>
    </div>
  );
}
