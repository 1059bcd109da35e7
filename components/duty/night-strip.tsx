import { stripPaths, USUAL_LENGTH } from './strip-paths';

/**
 * The two patterns of all strips of the page. A strip is drawn in seconds by its own height and then stretched, so each
 * pattern is pressed together by as much: for a strip of 450 px, and for one of 150 px on a phone.
 */
export function SharedPatterns() {
  return (
    <svg aria-hidden="true" className="absolute size-0">
      <defs>
        {[
          ['duty', 192],
          ['duty-narrow', 576],
        ].map(([id, secondsAPixel]) => (
          <g key={id}>
            <pattern
              id={`${id}-rest`}
              width="6"
              height="6"
              patternUnits="userSpaceOnUse"
              patternTransform={`scale(${secondsAPixel} 0.0714) rotate(45)`}
            >
              <rect width="1.8" height="6" className="fill-ember" />
            </pattern>
            <pattern
              id={`${id}-held`}
              width="5"
              height="5"
              patternUnits="userSpaceOnUse"
              patternTransform={`scale(${secondsAPixel} 0.0714)`}
            >
              <circle cx="2.5" cy="2.5" r="1.1" className="fill-ink" />
            </pattern>
          </g>
        ))}
      </defs>
    </svg>
  );
}

const REST = 'stroke-[url(#duty-narrow-rest)] sm:stroke-[url(#duty-rest)]';
const HELD = 'stroke-[url(#duty-narrow-held)] sm:stroke-[url(#duty-held)]';

/** One channel's night from noon to noon. Its words stand beside it, so to a reader that cannot see it it is nothing. */
export function NightStrip({
  packed,
  length = USUAL_LENGTH,
}: {
  packed: string;
  length?: number | undefined;
}) {
  const { run, rest, held, handOn, handOff } = stripPaths(packed);
  return (
    <svg
      aria-hidden="true"
      viewBox={`0 -0.5 ${length} 1`}
      preserveAspectRatio="none"
      className="block h-3.5 w-full"
    >
      {rest === undefined ? null : <path d={rest} className={REST} />}
      {held === undefined ? null : <path d={held} className={HELD} />}
      {run === undefined ? null : <path d={run} className="stroke-ember" />}
      {handOn === undefined ? null : (
        <path
          d={handOn}
          vectorEffect="non-scaling-stroke"
          className="fill-ember/45 stroke-ink stroke-[1.5]"
        />
      )}
      {handOff === undefined ? null : (
        <path
          d={handOff}
          vectorEffect="non-scaling-stroke"
          className="fill-transparent stroke-ink stroke-[1.5]"
        />
      )}
    </svg>
  );
}

const CLOCK = {
  24: ['12', '18', '00', '06', '12'],
  12: ['12 pm', '6 pm', '12 am', '6 am', '12 pm'],
} as const;

/** Lines at noon, evening, midnight, morning and noon, behind a strip that fills its box. */
export const QUARTERS =
  'border-r border-line bg-[linear-gradient(to_right,var(--line)_1px,transparent_1px)] bg-size-[25%_100%]';

/** Noon, evening, midnight, morning, noon. */
export function StripAxis({ clock }: { clock: 24 | 12 }) {
  return (
    <span className="relative block h-4 font-mono text-[0.8rem] font-normal text-soft">
      {CLOCK[clock].map((name, place) => (
        <span
          key={place}
          className="absolute whitespace-nowrap"
          style={{ left: `${place * 25}%`, transform: `translateX(-${place * 25}%)` }}
        >
          {name}
        </span>
      ))}
    </span>
  );
}
