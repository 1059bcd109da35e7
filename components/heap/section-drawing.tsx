import { spotOf, surfaceM, type ProbePlace, type Section, type Spot } from '@/lib/analysis/probe-section';
import { fahrenheit } from '@/lib/units/conversion';
import { decimal, degrees, temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { isothermsOf } from './isotherms';

// narrow, so that figures can still be read where the drawing is as wide as a phone
const wide = 480;
const pad = { side: 34, top: 22, foot: 28 };

/** The heap in section with what the probe read, warmer between warm places; drawn on the server. */
export function SectionDrawing({
  id,
  section,
  places,
  preferences,
}: {
  /** Of the round: names its clip. */
  id: string;
  section: Section;
  places: ProbePlace[];
  preferences: Preferences;
}) {
  const scale = (wide - 2 * pad.side) / section.widthM;
  const tall = Math.max(section.heightM + section.sunkM, 0.2) * scale;
  // a flat, broad heap is drawn higher than it is, or its figures would stand on each other
  const up = Math.max(1, 170 / tall) * scale;
  const deep = (section.heightM + section.sunkM) * up;
  const high = pad.top + deep + pad.foot;
  const at = ({ x, y }: Spot): [number, number] => [pad.side + x * scale, pad.top + deep - y * up];
  const step = preferences.temperature === 'F' ? 10 : 5;
  const shown = (celsius: number) => (preferences.temperature === 'F' ? fahrenheit(celsius) : celsius);
  const { lines, hull } = isothermsOf(section, places, at, shown, step);
  const rim = Array.from({ length: 41 }, (_, i) => (section.widthM * i) / 40).map((x) =>
    at({ x, y: surfaceM(section, x) }),
  );
  const text = rim.map(([x, y]) => `${x.toFixed(1)},${y.toFixed(1)}`).join('L');
  const [, ground] = at({ x: 0, y: section.sunkM });
  const [right] = at({ x: section.widthM, y: 0 });
  const foot = pad.top + deep;
  const clip = `hull-${id}`;
  return (
    <svg
      role="img"
      aria-label={saidOf(section, places, preferences)}
      viewBox={`0 0 ${wide} ${high}`}
      className="mx-auto max-h-[36rem] w-full font-mono text-[16px] sm:text-[12px]"
    >
      <defs>
        <clipPath id={clip}>
          <path d={hull} />
        </clipPath>
      </defs>
      <path
        d={`M0,${ground}H${pad.side}V${foot}H${right}V${ground}H${wide}V${high}H0Z`}
        className="fill-earth"
      />
      <path d={`M${pad.side},${foot}L${text}L${right},${foot}Z`} className="fill-faint stroke-line" />
      <g clipPath={`url(#${clip})`}>
        {lines.map(({ level, path }) => (
          <path key={level} d={path} className="fill-ember/15 stroke-core/60" strokeWidth="0.8" />
        ))}
      </g>
      <path d={`M${text}`} fill="none" strokeWidth="3.5" strokeLinecap="round" className="stroke-ink" />
      <text x={pad.side / 2} y={foot - 8} textAnchor="middle" className="fill-soft font-sans">
        {section.left}
      </text>
      <text x={wide - pad.side / 2} y={foot - 8} textAnchor="middle" className="fill-soft font-sans">
        {section.right}
      </text>
      {places.map((place) => {
        const [x, y] = at(spotOf(section, place));
        return (
          <text
            key={`${place.column} ${place.row}`}
            x={x}
            y={y + 4}
            textAnchor="middle"
            strokeWidth="5"
            strokeLinejoin="round"
            style={{ paintOrder: 'stroke' }}
            className="fill-ink stroke-sheet/85"
          >
            {temperatureFigure(place.celsius, preferences)}
          </text>
        );
      })}
      <text x={pad.side} y={high - 8} className="fill-soft font-sans">
        {lines.length === 0
          ? 'Lines need three places that do not lie in one line.'
          : `Lines every ${step} ${degrees(preferences)}`}
      </text>
    </svg>
  );
}

function saidOf(section: Section, places: readonly ProbePlace[], preferences: Preferences): string {
  const rows = places.map(
    ({ column, row, celsius }) =>
      `column ${column + 1}, row ${row + 1}: ${temperatureFigure(celsius, preferences)}`,
  );
  return `Heap in section, ${decimal(section.widthM, 1)} m wide, ${section.left} at the left. In ${degrees(preferences)}, columns from the left, rows from the top: ${rows.join('; ')}.`;
}
