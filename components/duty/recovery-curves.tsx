import { scaleLinear } from 'd3-scale';
import { degreeTicks } from '@/components/chart/axis';
import { temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { curveAt, CurveGroup, type DrawnGroup, lengthOf } from './recovery-group';

const wide = 320;
const high = 214;
const box = { left: 30, right: wide - 8, top: 10, bottom: high - 24 };
/** How the base came back in rests: readings as dots, the fitted curves as lines, two groups apart by colour and dash. */
export function RecoveryCurves({ groups, preferences }: { groups: DrawnGroup[]; preferences: Preferences }) {
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
        <CurveGroup key={group.name} group={group} right={box.right} x={x} y={y} />
      ))}
    </svg>
  );
}
