import { StripPatterns } from '@/components/chart/strip';
import type { StripSpan } from '@/lib/analysis/nights';

/** Once on the page: four hundred strips share one pair of patterns. */
export function SharedPatterns() {
  return (
    <svg aria-hidden="true" className="absolute size-0">
      <StripPatterns id="duty" />
    </svg>
  );
}

function Spans({ spans, length, className }: { spans: StripSpan[]; length: number; className: string }) {
  const part = (seconds: number) => `${Math.round((seconds / length) * 10_000) / 100}%`;
  if (spans.length === 0) return null;
  return (
    <g className={className}>
      {spans.map(([, from, to]) => (
        <rect key={from} x={part(from)} width={part(to - from)} />
      ))}
    </g>
  );
}

/**
 * One channel's night from noon to noon. `length` is the whole night's, s: one that lasts ends early. Its words stand
 * beside it in the table, so to a reader that cannot see it it is nothing.
 */
export function NightStrip({
  spans,
  length,
  tall = false,
}: {
  spans: StripSpan[];
  length: number;
  tall?: boolean;
}) {
  const of = (kind: StripSpan[0], on?: boolean) =>
    spans.filter((span) => span[0] === kind && (on === undefined || span[3] === on));
  return (
    <svg
      aria-hidden="true"
      className={`block w-full overflow-visible [&_rect]:h-full ${tall ? 'h-7' : 'h-3.5'}`}
      preserveAspectRatio="none"
    >
      <Spans spans={of('rest')} length={length} className="fill-[url(#duty-rest)]" />
      <Spans spans={of('held')} length={length} className="fill-[url(#duty-held)]" />
      <Spans spans={of('run')} length={length} className="fill-ember" />
      <Spans spans={of('hand', true)} length={length} className="fill-ember/45 stroke-ink stroke-[1.5]" />
      <Spans spans={of('hand', false)} length={length} className="fill-transparent stroke-ink stroke-[1.5]" />
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
