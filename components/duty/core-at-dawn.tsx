import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import type { NightSummary } from '@/lib/analysis/nights';
import { temperature, temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { day } from '@/lib/units/time';
import { nightDate } from '@/lib/wording/duty';
import { DawnTable } from './dawn-table';

const wide = 320;
const high = 190;
const box = { left: 30, right: wide - 8, top: 34, bottom: high - 24 };

export interface Dawn {
  at: number;
  value: number;
  night: string;
}

export function dawnsOf(nights: readonly NightSummary[]): Dawn[] {
  return nights.flatMap(({ coreAtDawn, night }) => (coreAtDawn === null ? [] : [{ ...coreAtDawn, night }]));
}

/** The heap's core at each sunrise, with what was done to the heap. */
export function CoreAtDawn({
  dawns,
  marks,
  zone,
  preferences,
}: {
  dawns: Dawn[];
  marks: { at: number; kind: string }[];
  zone: string;
  preferences: Preferences;
}) {
  const [first, last] = [dawns[0], dawns.at(-1)];
  if (first === undefined || last === undefined) return null;
  const values = dawns.map((dawn) => dawn.value);
  const x = scaleLinear([first.at, Math.max(last.at, first.at + 1)], [box.left, box.right]);
  // at least 8 K high, or the day-to-day wander of a steady heap would look like a drama
  const middle = (Math.min(...values) + Math.max(...values)) / 2;
  const half = Math.max(4, (Math.max(...values) - Math.min(...values)) / 2);
  const y = scaleLinear([middle - half, middle + half], [box.bottom, box.top]).nice(4);
  const path =
    line<Dawn>(
      (dawn) => x(dawn.at),
      (dawn) => y(dawn.value),
    ).digits(1)(dawns) ?? '';
  const said = `Core at dawn, ${nightDate(first.night)} to ${nightDate(last.night)}: from ${temperature(first.value, preferences)} to ${temperature(last.value, preferences)}, between ${temperature(Math.min(...values), preferences)} and ${temperature(Math.max(...values), preferences)}.`;
  return (
    <figure>
      <svg
        role="img"
        aria-label={said}
        viewBox={`0 0 ${wide} ${high}`}
        className="w-full font-mono text-[10.5px]"
      >
        {y.ticks(4).map((tick) => (
          <g key={tick}>
            <line x1={box.left} x2={box.right} y1={y(tick)} y2={y(tick)} className="stroke-faint" />
            <text x={box.left - 6} y={y(tick) + 3.5} textAnchor="end" className="fill-soft">
              {temperatureFigure(tick, preferences, 0)}
            </text>
          </g>
        ))}
        <Marks marks={marks.filter((mark) => mark.at >= first.at && mark.at <= last.at)} x={x} />
        <path d={path} fill="none" strokeWidth="2" className="stroke-core" />
        {dawns.length === 1 ? (
          <circle cx={x(first.at)} cy={y(first.value)} r="3" className="fill-core" />
        ) : null}
        <text x={box.left} y={high - 6} className="fill-soft">
          {day(first.at, zone)}
        </text>
        <text x={box.right} y={high - 6} textAnchor="end" className="fill-soft">
          {day(last.at, zone)}
        </text>
      </svg>
      <DawnTable rows={dawns.map((dawn) => [day(dawn.at, zone), temperature(dawn.value, preferences)])} />
    </figure>
  );
}

/** Names stand at two heights in turn, so that two entries of one week do not write over each other. */
function Marks({ marks, x }: { marks: { at: number; kind: string }[]; x: (at: number) => number }) {
  return marks.map((mark, place) => {
    const isLate = x(mark.at) > box.right - 40;
    return (
      <g key={`${mark.at} ${mark.kind}`}>
        <line
          x1={x(mark.at)}
          x2={x(mark.at)}
          y1={place % 2 === 0 ? 8 : 20}
          y2={box.bottom}
          className="stroke-edge"
          strokeDasharray="2 2"
        />
        <text
          x={x(mark.at) + (isLate ? -3 : 3)}
          y={place % 2 === 0 ? 14 : 26}
          textAnchor={isLate ? 'end' : 'start'}
          className="fill-ink font-sans"
        >
          {mark.kind}
        </text>
      </g>
    );
  });
}
