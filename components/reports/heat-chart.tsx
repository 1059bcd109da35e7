import { scaleLinear } from 'd3-scale';
import type { NightSummary } from '@/lib/analysis/nights';
import { decimal } from '@/lib/units/format';
import { nightDate } from '@/lib/wording/duty';

const WIDTH = 720;
const HEIGHT = 150;
const LEFT = 44;
const FOOT = 22;

/** Heat of each night with its deviation, as bars, drawn by the server so that it prints as it is seen. */
export function HeatChart({ name, nights }: { name: string; nights: readonly NightSummary[] }) {
  const known = nights.flatMap(({ heat }) => (heat === null ? [] : [heat]));
  const y = scaleLinear()
    .domain([
      Math.min(0, ...known.map((heat) => heat.kWh - heat.sd)),
      Math.max(0.5, ...known.map((heat) => heat.kWh + heat.sd)),
    ])
    .nice(3)
    .range([HEIGHT - FOOT, 8]);
  const step = (WIDTH - LEFT) / Math.max(nights.length, 1);
  const middle = (at: number) => LEFT + (at + 0.5) * step;
  // few nights stay bars, not blocks
  const thick = Math.min(step * 0.7, 36);
  const every = Math.max(1, Math.ceil(nights.length / 8));
  const text = 'fill-soft font-mono text-[11px]';
  const words = nights.map(
    ({ night, heat }) => `${nightDate(night)} ${heat === null ? 'not known' : decimal(heat.kWh, 1)}`,
  );
  return (
    <figure className="print:break-inside-avoid">
      <figcaption className="text-[0.9rem] text-soft">
        Heat of {name} each night, kWh, with its deviation
      </figcaption>
      <svg
        role="img"
        aria-label={`Heat of ${name} each night in kWh: ${words.join(', ')}.`}
        viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
        className="block w-full"
      >
        {y.ticks(3).map((tick) => (
          <g key={tick}>
            <line x1={LEFT} x2={WIDTH} y1={y(tick)} y2={y(tick)} className="stroke-line" />
            <text x={LEFT - 6} y={y(tick) + 4} textAnchor="end" className={text}>
              {decimal(tick, Number.isInteger(tick) ? 0 : 1)}
            </text>
          </g>
        ))}
        {nights.map(({ night, heat }, at) => (
          <g key={night}>
            {heat === null ? null : (
              <>
                <rect
                  x={middle(at) - thick / 2}
                  width={thick}
                  y={Math.min(y(heat.kWh), y(0))}
                  height={Math.abs(y(0) - y(heat.kWh))}
                  className="fill-ember"
                />
                <line
                  x1={middle(at)}
                  x2={middle(at)}
                  y1={y(heat.kWh - heat.sd)}
                  y2={y(heat.kWh + heat.sd)}
                  className="stroke-ink"
                />
              </>
            )}
            {at % every === 0 ? (
              <text x={middle(at)} y={HEIGHT - 6} textAnchor="middle" className={text}>
                {nightDate(night)}
              </text>
            ) : null}
          </g>
        ))}
      </svg>
    </figure>
  );
}
