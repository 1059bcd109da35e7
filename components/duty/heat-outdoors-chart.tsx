'use client';
import { Area, ComposedChart, ErrorBar, Line, Scatter, XAxis, YAxis } from 'recharts';
import { scaleLinear } from 'd3-scale';
import { useEffect, useMemo, useRef, useState } from 'react';

export interface OutdoorsChartProps {
  /** What the chart shows, for who does not see it. */
  said: string;
  /** In the reader's degrees. */
  unit: string;
  nights: [outdoors: number, kWh: number, sd: number][];
  curve: { outdoors: number; kWh: number; line: [number, number]; night: [number, number] }[];
}

const AXIS = { fontSize: 10.5, fontFamily: 'var(--face-figure)', fill: 'var(--soft)' };

/** Nights as dots with their deviation; the line, its interval darker, that of a single night lighter. */
export default function HeatOutdoorsChart({ unit, nights, curve }: OutdoorsChartProps) {
  const place = useRef<HTMLDivElement>(null);
  const cold = nights.map(([outdoors]) => outdoors);
  // whole degrees beyond the outermost nights, so that round figures stand on the axis
  const ends = [Math.floor(Math.min(...cold)), Math.ceil(Math.max(...cold))];
  const dots = useMemo(() => nights.map(([outdoors, kWh, sd]) => ({ outdoors, kWh, sd })), [nights]);
  const [width, setWidth] = useState(0);
  useEffect(() => {
    const element = place.current;
    if (element === null) return;
    const observer = new ResizeObserver(([entry]) => setWidth(Math.floor(entry?.contentRect.width ?? 0)));
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return (
    <div ref={place} aria-hidden="true" className="h-52">
      {width === 0 ? null : (
        <ComposedChart
          width={width}
          height={208}
          margin={{ top: 14, right: 22, bottom: 2, left: -22 }}
          accessibilityLayer={false}
        >
          <XAxis
            dataKey="outdoors"
            type="number"
            domain={ends}
            ticks={scaleLinear(ends, [0, 1]).ticks(6)}
            tickFormatter={figure}
            tick={AXIS}
            stroke="var(--line)"
            unit={` ${unit}`}
            allowDuplicatedCategory={false}
          />
          <YAxis type="number" tickCount={5} tickFormatter={figure} tick={AXIS} stroke="var(--line)" />
          <Area
            data={curve}
            dataKey="night"
            stroke="none"
            fill="var(--ember)"
            fillOpacity={0.1}
            isAnimationActive={false}
          />
          <Area
            data={curve}
            dataKey="line"
            stroke="none"
            fill="var(--ember)"
            fillOpacity={0.22}
            isAnimationActive={false}
          />
          <Line
            data={curve}
            dataKey="kWh"
            stroke="var(--ember)"
            strokeWidth={1.6}
            dot={false}
            isAnimationActive={false}
          />
          <Scatter data={dots} dataKey="kWh" shape={<Dot />} isAnimationActive={false}>
            <ErrorBar dataKey="sd" direction="y" width={0} strokeWidth={1} stroke="var(--soft)" />
          </Scatter>
        </ComposedChart>
      )}
    </div>
  );
}

/** Small: a winter's nights lie close together. */
function Dot({ cx, cy }: { cx?: number; cy?: number }) {
  return <circle cx={cx} cy={cy} r="2" className="fill-ink" />;
}

/** With a true minus, as everywhere. */
const figure = (value: number) => String(Math.round(value * 10) / 10).replace('-', '−');
