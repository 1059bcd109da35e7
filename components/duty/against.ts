/** With what the chosen nights are compared: one word of the address. Slugs hold no full stop, so it may part them. */

export type Against =
  /** As many nights of the same source, just before. */
  | { kind: 'before' }
  /** Other nights of the same source. */
  | { kind: 'nights'; from: string; to: string }
  /** The same nights of another source, of this house or another. */
  | { kind: 'source'; house: string; source: string }
  /** The same nights of another house, both with all that heats them. */
  | { kind: 'house'; house: string };

const SLUG = /^[a-z0-9-]{1,140}$/;

/** A day of the calendar: 30 February is none. */
function isNight(text: string): boolean {
  const at = Date.parse(`${text}T00:00:00Z`);
  return Number.isFinite(at) && new Date(at).toISOString().slice(0, 10) === text;
}

/** @example readAgainst('source.prop-house.yew-heap') is the yew heap of the prop house; null: it says nothing. */
export function readAgainst(text: string): Against | null {
  const [kind, first = '', second = '', ...more] = text.split('.');
  if (more.length > 0) return null;
  if (kind === 'before' && first === '') return { kind };
  if (kind === 'nights' && isNight(first) && isNight(second) && first <= second)
    return { kind, from: first, to: second };
  if (kind === 'source' && SLUG.test(first) && SLUG.test(second))
    return { kind, house: first, source: second };
  if (kind === 'house' && SLUG.test(first) && second === '') return { kind, house: first };
  return null;
}

export function againstText(against: Against): string {
  switch (against.kind) {
    case 'before':
      return 'before';
    case 'nights':
      return `nights.${against.from}.${against.to}`;
    case 'source':
      return `source.${against.house}.${against.source}`;
    case 'house':
      return `house.${against.house}`;
  }
}
