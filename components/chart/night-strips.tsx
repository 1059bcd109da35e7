import { shortened, type NightLayout } from './night-layout';
import { Strip } from './strip';

/** When each channel ran, rested and was held, under the lines of its night. */
export function NightStrips({ layout, id }: { layout: NightLayout; id: string }) {
  const { frame, x0, x1 } = layout;
  return (
    <>
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
            {frame.namesAbove ? strip.name : shortened(strip.name)}
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
    </>
  );
}
