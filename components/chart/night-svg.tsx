import { classes } from '@/components/ui/classes';
import type { NightLayout } from './night-layout';
import { Strip, StripPatterns } from './strip';

const strokes: Record<string, string> = {
  'house-air': 'stroke-house',
  bench: 'stroke-house',
  outdoors: 'stroke-outdoors',
  'loop-return': 'stroke-ember',
};
const fills: Record<string, string> = {
  'house-air': 'fill-house',
  bench: 'fill-house',
  outdoors: 'fill-outdoors',
  'loop-return': 'fill-ember',
};
/** Lines of one colour differ by weight and dash too. */
const DASHES = [undefined, '5 3', '2 3', '8 3 2 3'];

const small = 'font-mono text-[11.5px]';

/** One drawing of the night; its meaning stands in the summary and the table beside it, so it is hidden from readers. */
export function NightSvg({ layout, id, className }: { layout: NightLayout; id: string; className: string }) {
  const { frame, x0, x1, yTop, yBottom, height } = layout;
  return (
    <svg
      aria-hidden="true"
      viewBox={`0 0 ${frame.width} ${height}`}
      className={classes('h-auto w-full select-none', className)}
    >
      <StripPatterns id={id} />
      <clipPath id={`${id}-plot`}>
        <rect x={x0} y={yTop} width={x1 - x0} height={yBottom - yTop} />
      </clipPath>
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
      {layout.bands.map((band) => (
        <g key={band.key}>
          <rect
            {...{ x: band.x, y: band.y, width: band.width, height: Math.max(1, band.height) }}
            className={band.isMain ? 'fill-house/17' : 'fill-transparent stroke-house/55'}
            strokeDasharray={band.isMain ? undefined : '2 4'}
          />
        </g>
      ))}
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
      {layout.frost === null ? null : (
        <>
          <line
            x1={x0}
            x2={x1}
            y1={layout.frost.y}
            y2={layout.frost.y}
            className="stroke-alarm/60"
            strokeDasharray="1 4"
            strokeLinecap="round"
            strokeWidth="1.5"
          />
          <text
            x={layout.frost.x}
            y={layout.frost.y + 12}
            textAnchor={layout.frost.anchor}
            className={classes('fill-soft', small)}
          >
            {layout.frost.text}
          </text>
        </>
      )}
      {layout.lines.map((line) => (
        <path
          key={line.key}
          d={line.path}
          clipPath={`url(#${id}-plot)`}
          fill="none"
          strokeWidth={line.isMain ? 2.4 : line.role === 'bench' || line.role === 'house-air' ? 1.3 : 1.6}
          strokeDasharray={
            line.isMain ? undefined : DASHES[line.role === 'house-air' ? 1 : line.rank % DASHES.length]
          }
          strokeLinejoin="round"
          strokeLinecap="round"
          className={strokes[line.role] ?? 'stroke-soft'}
        />
      ))}
      {layout.bands.flatMap((band) =>
        band.labels.map((label) => (
          <text
            key={`${label.text}-${label.x}`}
            x={label.x}
            y={label.y}
            textAnchor={label.anchor}
            className={classes('fill-house', small)}
            stroke="var(--sheet)"
            strokeWidth="3"
            paintOrder="stroke"
          >
            {label.text}
          </text>
        )),
      )}
      {layout.labels.map((label) => (
        <text
          key={label.key}
          x={label.x}
          y={label.y + 4}
          className={classes(
            'text-[12px]',
            fills[label.role] ?? 'fill-soft',
            label.isMain && 'font-semibold',
          )}
          stroke="var(--sheet)"
          strokeWidth="3"
          paintOrder="stroke"
        >
          {label.text}
        </text>
      ))}
      {layout.now === null ? null : (
        <>
          <line
            x1={layout.now.x}
            x2={layout.now.x}
            y1={yTop - 12}
            y2={height - 22}
            className="stroke-ink"
            strokeWidth="1.2"
          />
          <text
            x={layout.now.x + (layout.now.anchor === 'end' ? -5 : 5)}
            y={yTop - 8}
            textAnchor={layout.now.anchor}
            className={classes('fill-ink', small)}
          >
            {layout.now.text}
          </text>
        </>
      )}
      {layout.strips.map((strip) => (
        <g key={strip.key}>
          <line
            x1={x0}
            x2={x1}
            y1={strip.y + frame.stripHeight}
            y2={strip.y + frame.stripHeight}
            className="stroke-line"
          />
          <Strip id={id} boxes={strip.boxes} y={strip.y} height={frame.stripHeight} />
          <text
            x={frame.namesAbove ? x0 : x1 + 6}
            y={frame.namesAbove ? strip.y - 4 : strip.y + frame.stripHeight - 2}
            className="fill-ink text-[12px]"
            stroke="var(--sheet)"
            strokeWidth="3"
            paintOrder="stroke"
          >
            {strip.name.length > 17 && !frame.namesAbove ? `${strip.name.slice(0, 15)}…` : strip.name}
          </text>
          {/* over the whole strip, with half the gap to its neighbours, for whoever wants to press it */}
          <rect
            data-strip={strip.key}
            x={x0}
            width={x1 - x0}
            y={strip.y - (frame.stripStep - frame.stripHeight) / 2}
            height={frame.stripStep}
            className="cursor-pointer fill-transparent"
          />
        </g>
      ))}
      <line x1={x0} x2={x1} y1={yBottom} y2={yBottom} className="stroke-line" />
    </svg>
  );
}
