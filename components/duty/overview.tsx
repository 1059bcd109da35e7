'use client';
import { useMemo } from 'react';
import { addressOf, type DutyAddress } from './address';
import { againstText } from './against';
import type { Brush } from './brush';
import { BrushEnds } from './brush-ends';
import { BARS_HIGH, barsPath, type OverviewTick } from './overview-layout';
import { useBrushes } from './use-brushes';
import { useDrawing } from './use-drawing';

export interface OverviewProps {
  house: string;
  address: DutyAddress;
  /** Names, ascending. */
  nights: string[];
  /** What each night's bar is as high as, and what that is in words. */
  heights: (number | null)[];
  of: string;
  ticks: OverviewTick[];
  chosen: Brush | null;
  /** Nights of the same source that the chosen ones are compared with by a brush of their own. */
  other: Brush | null;
}

/** All nights as bars, over which some are chosen: by drawing over them, or with the ends as sliders. */
export function Overview(props: OverviewProps) {
  const { house, address, nights, heights, ticks, of } = props;
  const count = nights.length;
  // here and not on the server: the path of four hundred bars is four times as long as their heights, and would be sent twice
  const bars = useMemo(() => barsPath(heights), [heights]);
  const { brushes, draft, commit } = useBrushes(props, (next) => {
    const change: Partial<DutyAddress> = { night: undefined };
    const { chosen, other } = next;
    change.from = chosen === null ? undefined : nights[chosen.first];
    change.to = chosen === null ? undefined : nights[chosen.last];
    const [from, to] = other === null ? [] : [nights[other.first], nights[other.last]];
    if (from !== undefined && to !== undefined) change.against = againstText({ kind: 'nights', from, to });
    return addressOf(house, address, change);
  });
  const pointer = useDrawing({ count, brushes, draft, commit });
  return (
    <div role="group" aria-label="Choose nights" className="not-on-paper">
      <p className="flex justify-between gap-4 pb-1 text-[0.85rem] text-soft">
        <span>{of}</span>
        <span className="max-sm:hidden">draw over some nights to choose them</span>
      </p>
      <div
        className="relative h-12 cursor-crosshair touch-pan-y select-none border-b border-line"
        {...pointer}
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
