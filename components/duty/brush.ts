/**
 * The arithmetic of a brush over a row of nights. A brush is two places in the row, first and last, both included; a night
 * takes the width of one place. Pure, so that pointer and keyboard can be tested without a browser.
 */
export interface Brush {
  first: number;
  last: number;
}

export type Handle = 'first' | 'last' | 'both';

const within = (place: number, count: number) => Math.min(count - 1, Math.max(0, place));

/** Which of `count` nights lies under a pointer at `part` of the row's width, 0 to 1. */
export function placeAt(part: number, count: number): number {
  return within(Math.floor(part * count), count);
}

/** From where the pointer went down to where it is, whichever way it went. */
export function drawn(from: number, to: number, count: number): Brush {
  const [one, other] = [within(from, count), within(to, count)];
  return { first: Math.min(one, other), last: Math.max(one, other) };
}

/**
 * One end, or the whole brush, moved by so many nights. An end stops at the other one, so that a held key never turns the
 * brush over; the whole keeps its length and stops at the row's ends.
 */
export function moved(brush: Brush, handle: Handle, by: number, count: number): Brush {
  if (handle === 'first') return { ...brush, first: Math.min(brush.last, within(brush.first + by, count)) };
  if (handle === 'last') return { ...brush, last: Math.max(brush.first, within(brush.last + by, count)) };
  const step = Math.min(count - 1 - brush.last, Math.max(-brush.first, by));
  return { first: brush.first + step, last: brush.last + step };
}

/** How far a key moves an end: a night, a week, or to the row's end; null for any other key. */
export function keyStep(key: string, count: number): number | null {
  switch (key) {
    case 'ArrowLeft':
    case 'ArrowDown':
      return -1;
    case 'ArrowRight':
    case 'ArrowUp':
      return 1;
    case 'PageDown':
      return -7;
    case 'PageUp':
      return 7;
    case 'Home':
      return -count;
    case 'End':
      return count;
    default:
      return null;
  }
}

/** What of the brush lies under a place: an end within its reach, else its inside; null beside it. */
export function handleAt(brush: Brush, place: number, reach: number): Handle | null {
  const [toFirst, toLast] = [Math.abs(place - brush.first), Math.abs(place - brush.last)];
  if (Math.min(toFirst, toLast) <= reach)
    // of ends that lie together the one that can go where the pointer stands
    return toFirst === toLast
      ? place < brush.first
        ? 'first'
        : 'last'
      : toFirst < toLast
        ? 'first'
        : 'last';
  return place > brush.first && place < brush.last ? 'both' : null;
}

/** Where nights with these names stand in the row; null where none of them does. */
export function brushOf(nights: readonly string[], from: string, to: string): Brush | null {
  const first = nights.findIndex((night) => night >= from);
  const last = nights.findLastIndex((night) => night <= to);
  return first < 0 || last < first ? null : { first, last };
}
