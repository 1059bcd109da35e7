'use client';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useEffect, useMemo, useRef, useState, type KeyboardEvent, type PointerEvent } from 'react';
import type { Preferences } from '@/lib/units/preferences';
import { arrowStep, dayAt, type YearDay, yearLayout } from './year-layout';
import { dayWords } from './year-words';

const CELL_PX = 13;
/** Cells' widths left of the weeks for their days' names, and right for the last month's. */
const LEFT = 2.1;
const RIGHT = 1;
const TOP = 1.2;

/** @param of JSON of a year's days, ascending @param to the address of an opened night, but for its name */
export function YearCalendar({ of, to, preferences }: { of: string; to: string; preferences: Preferences }) {
  const days = useMemo(() => JSON.parse(of) as YearDay[], [of]);
  const layout = useMemo(() => yearLayout(days), [days]);
  const [place, setPlace] = useState(days.length - 1);
  const scroller = useRef<HTMLDivElement>(null);
  const router = useRouter();
  // the newest nights stand at the right end, where a narrow screen would not show them
  useEffect(() => {
    scroller.current?.scrollTo({ left: scroller.current.scrollWidth });
  }, []);
  const day = days[place];
  if (day === undefined) return null;
  const cell = layout.cells[place];
  const href = `${to}${day.night}#night`;
  const words = dayWords(day, preferences);

  const under = (event: PointerEvent<SVGSVGElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    const unit = box.width / (LEFT + layout.weeks + RIGHT);
    const [x, y] = [(event.clientX - box.left) / unit - LEFT, (event.clientY - box.top) / unit - TOP];
    return dayAt(layout, Math.floor(x), Math.floor(y));
  };
  const onKey = (event: KeyboardEvent) => {
    const step = arrowStep(event.key);
    if (step !== null) {
      event.preventDefault();
      setPlace(Math.min(days.length - 1, Math.max(0, place + step)));
    }
    if (event.key === 'Enter') router.push(href);
  };
  return (
    <>
      <div ref={scroller} className="overflow-x-auto">
        <svg
          role="slider"
          tabIndex={0}
          aria-label="Night of the year: arrows choose one, Enter opens it"
          aria-valuemin={0}
          aria-valuemax={days.length - 1}
          aria-valuenow={place}
          aria-valuetext={words}
          onKeyDown={onKey}
          onPointerMove={(event) => setPlace(under(event) ?? place)}
          onClick={(event) => {
            const at = under(event as unknown as PointerEvent<SVGSVGElement>);
            if (at !== null) router.push(`${to}${days[at]?.night ?? ''}#night`);
          }}
          viewBox={`0 0 ${LEFT + layout.weeks + RIGHT} ${TOP + 7.2}`}
          style={{ width: (LEFT + layout.weeks + RIGHT) * CELL_PX }}
          className="block max-w-none cursor-pointer select-none text-[0.72px]"
        >
          {layout.months.map((month) => (
            <text key={`${month.week}`} x={LEFT + month.week} y="0.75" className="fill-soft">
              {month.label}
            </text>
          ))}
          {['Mon', 'Thu', 'Sun'].map((name, which) => (
            <text key={name} x="0" y={TOP + which * 3 + 0.68} className="fill-soft">
              {name}
            </text>
          ))}
          <g transform={`translate(${LEFT} ${TOP})`}>
            <path d={layout.frames} className="fill-faint" />
            <path d={layout.fills} className="fill-ember" />
            <path d={layout.cold} fill="none" strokeWidth="0.09" className="stroke-alarm" />
            {cell === undefined ? null : (
              <rect
                x={cell.week - 0.07}
                y={cell.weekday - 0.07}
                width="1"
                height="1"
                fill="none"
                strokeWidth="0.12"
                className="stroke-ink"
              />
            )}
          </g>
        </svg>
      </div>
      <p className="flex min-h-11 flex-wrap items-center gap-x-3 text-[0.9rem]">
        <span>{words}</span>
        <Link href={href} prefetch={false} className="not-on-paper underline underline-offset-4">
          Open this night
        </Link>
      </p>
    </>
  );
}
