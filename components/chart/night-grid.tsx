/** The ground of a night's chart: degrees, hours and the line of the frost limit. */
import { classes } from '@/components/ui/classes';
import type { NightLayout } from './night-layout';

export const small = 'font-mono text-[11.5px]';

export function Degrees({ layout }: { layout: NightLayout }) {
  const { x0, x1, yTop } = layout;
  return (
    <>
      {layout.degrees.map((tick) => (
        <g key={tick.celsius}>
          <line x1={x0} x2={x1} y1={tick.y} y2={tick.y} className="stroke-line" strokeWidth="1" />
          <text x={x0 - 6} y={tick.y + 4} textAnchor="end" className={classes('fill-soft', small)}>
            {tick.label.replace(/ .*/, '')}
          </text>
        </g>
      ))}
      <text x={x0 - 6} y={yTop - 8} textAnchor="end" className={classes('fill-soft', small)}>
        {layout.degrees.at(-1)?.label.replace(/^.* /, '')}
      </text>
    </>
  );
}

export function Hours({ layout }: { layout: NightLayout }) {
  const { x0, yTop, height } = layout;
  return (
    <>
      {layout.hours.map((tick) => (
        <g key={tick.at}>
          <line
            x1={tick.x}
            x2={tick.x}
            y1={tick.isMidnight ? yTop : height - 22}
            y2={height - 17}
            className="stroke-line"
          />
          <text
            x={tick.x}
            y={height - 4}
            textAnchor={tick.x === x0 ? 'start' : 'middle'}
            className={classes('fill-soft', small)}
          >
            {tick.label}
          </text>
        </g>
      ))}
    </>
  );
}

export function FrostLine({ layout: { frost, x0, x1 } }: { layout: NightLayout }) {
  if (frost === null) return null;
  return (
    <>
      <line
        x1={x0}
        x2={x1}
        y1={frost.y}
        y2={frost.y}
        className="stroke-alarm/60"
        strokeDasharray="1 4"
        strokeLinecap="round"
        strokeWidth="1.5"
      />
      <text x={frost.x} y={frost.y + 12} textAnchor={frost.anchor} className={classes('fill-soft', small)}>
        {frost.text}
      </text>
    </>
  );
}
