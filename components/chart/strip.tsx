import type { SpanKind } from '@/lib/analysis/spans';

/** A part of a strip; instants in any unit that `x` understands. */
export interface StripPart {
  kind: SpanKind;
  from: number;
  to: number;
  on: boolean;
}

export interface StripBox extends StripPart {
  x: number;
  width: number;
}

/**
 * Where the parts of a strip stand. What is plainly off is the ground and is left out; a run of a second still shows.
 * @param x from the parts' instants to drawing units
 */
export function stripBoxes(parts: readonly StripPart[], x: (at: number) => number): StripBox[] {
  return parts
    .filter((part) => part.kind !== 'off')
    .map((part) => {
      const left = x(part.from);
      return { ...part, x: left, width: Math.max(1, x(part.to) - left) };
    });
}

/** Once in each svg that draws strips, with an id of its own; patterns carry the meaning, colour only supports it. */
export function StripPatterns({ id }: { id: string }) {
  return (
    <defs>
      <pattern
        id={`${id}-rest`}
        width="6"
        height="6"
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(45)"
      >
        <rect width="1.8" height="6" className="fill-ember" />
      </pattern>
      <pattern id={`${id}-held`} width="5" height="5" patternUnits="userSpaceOnUse">
        <circle cx="2.5" cy="2.5" r="1.1" className="fill-ink" />
      </pattern>
    </defs>
  );
}

/** Run filled, rest hatched, held dotted, hand outlined (and tinted while the load runs). */
export function Strip({
  id,
  boxes,
  y,
  height,
}: {
  id: string;
  boxes: readonly StripBox[];
  y: number;
  height: number;
}) {
  return boxes.map((box) => {
    const place = { x: box.x, y, width: box.width, height };
    const key = `${box.from}-${box.kind}`;
    switch (box.kind) {
      case 'run':
        return <rect key={key} {...place} className="fill-ember" />;
      case 'rest':
        return <rect key={key} {...place} fill={`url(#${id}-rest)`} />;
      case 'held':
        return <rect key={key} {...place} fill={`url(#${id}-held)`} />;
      case 'hand':
        return (
          <rect
            key={key}
            x={box.x + 0.75}
            y={y + 0.75}
            width={Math.max(0.5, box.width - 1.5)}
            height={height - 1.5}
            className={box.on ? 'fill-ember/45 stroke-ink' : 'fill-transparent stroke-ink'}
            strokeWidth="1.5"
          />
        );
      default:
        return null;
    }
  });
}

/** The three patterns in words, for the head of a panel of strips. */
export function StripKey({ id }: { id: string }) {
  const parts = [
    { kind: 'run', on: true, words: 'run' },
    { kind: 'rest', on: false, words: 'rest' },
    { kind: 'held', on: false, words: 'held off' },
    { kind: 'hand', on: false, words: 'by hand' },
  ] as const;
  return (
    <ul className="flex flex-wrap gap-x-4 gap-y-1 text-[0.85rem] text-soft">
      {parts.map((part) => (
        <li key={part.kind} className="flex items-center gap-1.5">
          <svg aria-hidden="true" viewBox="0 0 16 12" className="h-3 w-4">
            <StripPatterns id={`${id}-${part.kind}`} />
            <Strip
              id={`${id}-${part.kind}`}
              boxes={[{ ...part, from: 0, to: 16, x: 0, width: 16 }]}
              y={0}
              height={12}
            />
          </svg>
          {part.words}
        </li>
      ))}
    </ul>
  );
}
