import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { fahrenheit } from '@/lib/units/conversion';
import { decimal, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { day } from '@/lib/units/time';
import { kindWord } from '@/lib/wording/heap';

const wide = 640;
const high = 230;
const box = { left: 44, right: wide - 12, top: 44, bottom: high - 28 };

interface Step {
  at: number;
  value: number;
}

/** A path of one point a drawing unit at most: a year of hours is not drawn finer than the screen. */
function thinned(curve: readonly Step[]): Step[] {
  const every = Math.max(1, Math.ceil(curve.length / (box.right - box.left)));
  return curve.filter((_, place) => place % every === 0 || place === curve.length - 1);
}

/** The core since the heap was built, with what was done to it. */
export function CoreCurve({
  curve,
  marks,
  floor,
  zone,
  preferences,
}: {
  curve: Step[];
  marks: { at: number; kind: string }[];
  floor: number | null;
  zone: string;
  preferences: Preferences;
}) {
  const [first, last] = [curve[0], curve.at(-1)];
  if (first === undefined || last === undefined)
    return <p className="text-soft">The core has no readings yet. Its curve begins with the first.</p>;
  // ticks are round in the reader's degrees, so the axis is made in them
  const shown = (celsius: number) => (preferences.temperature === 'F' ? fahrenheit(celsius) : celsius);
  const values = curve.map((step) => shown(step.value));
  const least = Math.min(...values, ...(floor === null ? [] : [shown(floor)]));
  const x = scaleLinear([first.at, Math.max(last.at, first.at + 1)], [box.left, box.right]);
  const y = scaleLinear([least - 1, Math.max(...values) + 1], [box.bottom, box.top]).nice(4);
  const path =
    line<Step>(
      (step) => x(step.at),
      (step) => y(shown(step.value)),
    )(thinned(curve)) ?? '';
  const hottest = curve.reduce((top, step) => (step.value > top.value ? step : top), first);
  const said = `Heap core from ${day(first.at, zone)} to ${day(last.at, zone)}: now ${temperature(last.value, preferences)}, hottest ${temperature(hottest.value, preferences)} on ${day(hottest.at, zone)}.`;
  return (
    <figure className="overflow-x-auto" tabIndex={0} aria-label="Core and what was done">
      <svg
        role="img"
        aria-label={said}
        viewBox={`0 0 ${wide} ${high}`}
        className="w-full min-w-[34rem] font-mono text-[12px]"
      >
        {y.ticks(4).map((tick) => (
          <g key={tick}>
            <line x1={box.left} x2={box.right} y1={y(tick)} y2={y(tick)} className="stroke-faint" />
            <text x={box.left - 8} y={y(tick) + 4} textAnchor="end" className="fill-soft">
              {decimal(tick, 0)}°
            </text>
          </g>
        ))}
        {floor === null ? null : (
          <g>
            <line
              x1={box.left}
              x2={box.right}
              y1={y(shown(floor))}
              y2={y(shown(floor))}
              strokeDasharray="6 4"
              className="stroke-warn"
            />
            <text x={box.left + 4} y={y(shown(floor)) - 5} className="fill-warn font-sans">
              not drawn on under {temperature(floor, preferences, 0)}
            </text>
          </g>
        )}
        <Marks marks={marks.filter((mark) => mark.at >= first.at && mark.at <= last.at)} x={x} />
        <path d={path} fill="none" strokeWidth="2.2" strokeLinejoin="round" className="stroke-core" />
        {[0, 1, 2, 3, 4].map((part) => {
          const at = first.at + ((last.at - first.at) * part) / 4;
          return (
            <text
              key={part}
              x={x(at)}
              y={high - 8}
              textAnchor={part === 0 ? 'start' : part === 4 ? 'end' : 'middle'}
              className="fill-soft"
            >
              {day(at, zone)}
            </text>
          );
        })}
      </svg>
    </figure>
  );
}

/** Names stand at three heights in turn, so that entries of one week do not write over each other. */
function Marks({ marks, x }: { marks: { at: number; kind: string }[]; x: (at: number) => number }) {
  return marks.map((mark, place) => {
    const top = 6 + (place % 3) * 13;
    const isLate = x(mark.at) > box.right - 60;
    return (
      <g key={`${mark.at} ${mark.kind}`}>
        <line
          x1={x(mark.at)}
          x2={x(mark.at)}
          y1={top}
          y2={box.bottom}
          className="stroke-edge"
          strokeDasharray="2 3"
        />
        <text
          x={x(mark.at) + (isLate ? -4 : 4)}
          y={top + 9}
          textAnchor={isLate ? 'end' : 'start'}
          className="fill-ink font-sans"
        >
          {kindWord(mark.kind).toLowerCase()}
        </text>
      </g>
    );
  });
}
