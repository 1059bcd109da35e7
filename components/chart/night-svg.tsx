import { classes } from '@/components/ui/classes';
import { Degrees, FrostLine, Hours, small } from './night-grid';
import type { NightLayout } from './night-layout';
import { NightStrips } from './night-strips';
import { StripPatterns } from './strip';

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
      <Degrees layout={layout} />
      {layout.bands.map((band) => (
        <g key={band.key}>
          <rect
            {...{ x: band.x, y: band.y, width: band.width, height: Math.max(1, band.height) }}
            className={band.isMain ? 'fill-house/17' : 'fill-transparent stroke-house/55'}
            strokeDasharray={band.isMain ? undefined : '2 4'}
          />
        </g>
      ))}
      <Hours layout={layout} />
      <FrostLine layout={layout} />
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
      <NightStrips layout={layout} id={id} />
      <line x1={x0} x2={x1} y1={yBottom} y2={yBottom} className="stroke-line" />
    </svg>
  );
}
