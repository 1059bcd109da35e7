/**
 * A sentence as parts, so that a page can colour a figure as its line in the chart beside it. The text alone must read
 * well: colour and weight only support it.
 */
export type Tone = 'outdoors' | 'house' | 'ember' | 'core' | 'base' | 'warn' | 'alarm';

export interface Part {
  text: string;
  tone?: Tone;
  strong?: boolean;
  /** Set in the mono face: keys of nodes and points. */
  mono?: boolean;
}
export type Sentence = Part[];

/** Joins texts and parts into one sentence; neighbours that look alike become one part. */
export function sentence(...pieces: (string | Part | Sentence)[]): Sentence {
  const parts: Sentence = [];
  for (const piece of pieces.flatMap((one) => (typeof one === 'string' ? [{ text: one }] : one))) {
    const last = parts.at(-1);
    if (piece.text === '') continue;
    if (last && last.tone === piece.tone && last.strong === piece.strong && last.mono === piece.mono) {
      parts[parts.length - 1] = { ...last, text: last.text + piece.text };
    } else {
      parts.push(piece);
    }
  }
  return parts;
}

/** The sentence without its colours: for titles, screen readers and tests. */
export function plain(parts: Sentence): string {
  return parts.map((part) => part.text).join('');
}

/** "a, b and c" of parts or texts. @example plain(listed(['a', 'b', 'c'])) === 'a, b and c' */
export function listed(items: (string | Part | Sentence)[], word = 'and'): Sentence {
  return sentence(
    ...items.flatMap((item, index) =>
      index === 0 ? [item] : [index === items.length - 1 ? ` ${word} ` : ', ', item],
    ),
  );
}
