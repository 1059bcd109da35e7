import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { degreeTicks } from '@/components/chart/axis';
import type { FittedRest } from '@/lib/analysis/rest-fit';
import { temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';

/** One rest: what was read beside the pipe, and the curve that was laid through it. */
export interface RestCurve {
  fit: FittedRest;
  /** Epoch ms and °C. */
  readings: { at: number; value: number }[];
}

export interface CurveGroup {
  name: string;
  tone: 'base' | 'core';
  rests: RestCurve[];
}

const wide = 320;
const high = 214;
const box = { left: 30, right: wide - 8, top: 10, bottom: high - 24 };
const STROKES = { base: 'stroke-base-tone', core: 'stroke-core' };
const FILLS = { base: 'fill-base-tone', core: 'fill-core' };
const CURVE_STEPS = 24;

/** s of the rest that were looked at: one of a whole day without a draw is drawn no further. */
const lengthOf = ({ from, to, lengthS }: FittedRest) => Math.min((to - from) / 1000, lengthS);

/** Where the fitted curve stands at so many seconds into the rest. */
function curveAt({ start, level, tau }: FittedRest, seconds: number): number {
  return level - (level - start) * Math.exp(-seconds / tau);
}

/** How the base came back in rests: readings as dots, the fitted curves as lines, two groups apart by colour and dash. */
export function RecoveryCurves({ groups, preferences }: { groups: CurveGroup[]; preferences: Preferences }) {
  const rests = groups.flatMap((group) => group.rests);
  if (rests.length === 0) return null;
  const longest = Math.max(...rests.map(({ fit }) => lengthOf(fit)));
  const values = rests.flatMap(({ fit, readings }) => [
    fit.start,
    curveAt(fit, lengthOf(fit)),
    ...readings.map((one) => one.value),
  ]);
  const x = scaleLinear([0, longest], [box.left, box.right]);
  const y = scaleLinear([Math.min(...values) - 0.5, Math.max(...values) + 0.9], [box.bottom, box.top]);
  const ticks = degreeTicks(y.invert(box.bottom), y.invert(box.top), 5, preferences);
  const said = groups
    .flatMap((group) => {
      const first = group.rests[0]?.fit;
      return first === undefined
        ? []
        : `${group.name}: ${group.rests.length} rests, the first from ${temperature(first.start, preferences)} towards ${temperature(first.level, preferences)}.`;
    })
    .join(' ');
  return (
    <svg
      role="img"
      aria-label={`The heap beside the pipe in rests. ${said}`}
      viewBox={`0 0 ${wide} ${high}`}
      className="w-full font-mono text-[10.5px]"
    >
      {ticks.map((tick) => (
        <g key={tick.celsius}>
          <line
            x1={box.left}
            x2={box.right}
            y1={y(tick.celsius)}
            y2={y(tick.celsius)}
            className="stroke-faint"
          />
          <text x={box.left - 5} y={y(tick.celsius) + 3.5} textAnchor="end" className="fill-soft">
            {tick.label.split(' ')[0]}
          </text>
        </g>
      ))}
      {scaleLinear([0, longest / 60], [0, 1])
        .ticks(4)
        .map((minutes) => (
          <text key={minutes} x={x(minutes * 60)} y={high - 8} textAnchor="middle" className="fill-soft">
            {minutes === 0 ? '0 min' : minutes}
          </text>
        ))}
      {groups.map((group) => (
        <Group key={group.name} group={group} x={x} y={y} />
      ))}
    </svg>
  );
}

function Group({
  group,
  x,
  y,
}: {
  group: CurveGroup;
  x: (seconds: number) => number;
  y: (celsius: number) => number;
}) {
  const ends = group.rests.map(({ fit }) => y(curveAt(fit, lengthOf(fit))));
  // the name stands clear of its curves, on the side where the other group is not
  const nameY = group.tone === 'core' ? Math.max(...ends) + 15 : Math.min(...ends) - 6;
  const path = ({ fit }: RestCurve) =>
    line().digits(1)(
      Array.from({ length: CURVE_STEPS + 1 }, (_, step): [number, number] => {
        const seconds = lengthOf(fit) * (step / CURVE_STEPS);
        return [x(seconds), y(curveAt(fit, seconds))];
      }),
    ) ?? '';
  const dots = group.rests
    .flatMap(({ fit, readings }) =>
      readings.map((one) => `M${x((one.at - fit.from) / 1000).toFixed(1)} ${y(one.value).toFixed(1)}h0`),
    )
    .join('');
  return (
    <g>
      <path
        d={dots}
        strokeWidth="2.2"
        strokeLinecap="round"
        className={`${STROKES[group.tone]} opacity-45`}
      />
      {group.rests.map((rest) => (
        <path
          key={rest.fit.from}
          d={path(rest)}
          fill="none"
          strokeWidth="1.3"
          strokeDasharray={group.tone === 'core' ? '5 2.5' : undefined}
          className={STROKES[group.tone]}
        />
      ))}
      {ends.length === 0 ? null : (
        <text
          x={box.right}
          y={nameY}
          textAnchor="end"
          className={`font-sans font-semibold ${FILLS[group.tone]}`}
          stroke="var(--sheet)"
          strokeWidth="3"
          paintOrder="stroke"
        >
          {group.name}
        </text>
      )}
    </g>
  );
}
