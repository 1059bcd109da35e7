import { line } from 'd3-shape';
import type { FittedRest } from '@/lib/analysis/rest-fit';

/** One rest: what was read beside the pipe, and the curve that was laid through it. */
export interface RestCurve {
  fit: FittedRest;
  /** Epoch ms and °C. */
  readings: { at: number; value: number }[];
}

export interface DrawnGroup {
  name: string;
  tone: 'base' | 'core';
  rests: RestCurve[];
}

const STROKES = { base: 'stroke-base-tone', core: 'stroke-core' };
const FILLS = { base: 'fill-base-tone', core: 'fill-core' };
const CURVE_STEPS = 24;

/** s of the rest that were looked at: one of a whole day without a draw is drawn no further. */
export const lengthOf = ({ from, to, lengthS }: FittedRest) => Math.min((to - from) / 1000, lengthS);

/** Where the fitted curve stands at so many seconds into the rest. */
export function curveAt({ start, level, tau }: FittedRest, seconds: number): number {
  return level - (level - start) * Math.exp(-seconds / tau);
}

/** The rests of one week: readings as dots, fitted curves as lines, and the week's name beside them. */
export function CurveGroup({
  group,
  right,
  x,
  y,
}: {
  group: DrawnGroup;
  /** Where names end. */
  right: number;
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
          x={right}
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
