/** Joins the pieces of a sentence. */
import type { Phrase } from './phrase';

/** Pieces to one list; neighbouring plain texts become one. */
export function join(...pieces: (Phrase | Phrase[])[]): Phrase[] {
  const joined: Phrase[] = [];
  for (const piece of pieces.flat()) {
    const last = joined.at(-1);
    if (piece === '') continue;
    if (typeof piece === 'string' && typeof last === 'string') joined[joined.length - 1] = last + piece;
    else joined.push(piece);
  }
  return joined;
}

/** @example between([['a'], ['b'], ['c']], ', ', ' or ') reads "a, b or c" */
export function between(items: (Phrase | Phrase[])[], comma: string, last = comma): Phrase[] {
  return join(
    ...items.flatMap((item, index) =>
      index === 0 ? [item] : [index === items.length - 1 ? last : comma, item],
    ),
  );
}

/** Sentences with a space between; empty ones leave no trace. */
export function sentences(...all: Phrase[][]): Phrase[] {
  return between(
    all.filter((one) => one.length > 0),
    ' ',
  );
}
