/**
 * A channel's night as few short paths. Four hundred nights have some ten thousand runs and rests; a shape for each would
 * cost a phone a second, so all runs of a night are one path of strokes as high as the strip: `m` skips, `h` draws.
 *
 * What goes over a slow line is less than the paths: one span behind the other, a letter and its seconds. In paths a rest
 * would tell once more where the run before it ended.
 */
import type { StripSpan } from '@/lib/analysis/nights';

/** What draws nothing is left out. */
export interface StripPaths {
  run?: string;
  rest?: string;
  held?: string;
  /** By hand, on and off: outlined, so these are closed boxes. */
  handOn?: string;
  handOff?: string;
}

/** Length of a night, s, but for one that lasts and two a year. */
export const USUAL_LENGTH = 86_400;

const NOTHING = 'n';
const LETTERS = new Map<string, keyof StripPaths>([
  ['r', 'run'],
  ['x', 'rest'],
  ['h', 'held'],
  ['o', 'handOn'],
  ['f', 'handOff'],
]);

function letterOf([kind, , , on]: StripSpan): string {
  if (kind === 'off') return NOTHING;
  if (kind === 'hand') return on ? 'o' : 'f';
  return kind === 'rest' ? 'x' : kind.charAt(0);
}

/**
 * Spans that meet are one on paper, though different reasons decided them; one of no length draws nothing.
 * @param spans ascending, in whole seconds from the night's first noon
 * @example a run of 600–1800 and a rest of 1800–3600: 'n600r1200x1800'
 */
export function packStrip(spans: readonly StripSpan[]): string {
  const parts: { letter: string; length: number }[] = [];
  const add = (letter: string, length: number) => {
    const last = parts.at(-1);
    if (last?.letter === letter) last.length += length;
    else if (length !== 0) parts.push({ letter, length });
  };
  let at = 0;
  for (const span of spans) {
    const [, from, to] = span;
    if (to <= from) continue;
    add(NOTHING, from - at);
    add(letterOf(span), to - from);
    at = to;
  }
  if (parts.at(-1)?.letter === NOTHING) parts.pop();
  return parts.map(({ letter, length }) => `${letter}${length}`).join('');
}

/** @param packed as packStrip made it @example 'n600r1200n1800r600' runs 'm600 0h1200m1800 0h600' */
export function stripPaths(packed: string): StripPaths {
  const paths: StripPaths = {};
  const ends: Partial<Record<keyof StripPaths, number>> = {};
  let at = 0;
  for (const [, letter = '', digits] of packed.matchAll(/([a-z])(-?\d+)/g)) {
    const [from, length] = [at, Number(digits)];
    at += length;
    const path = LETTERS.get(letter);
    if (path === undefined) continue;
    const isBox = path === 'handOn' || path === 'handOff';
    const drawn = isBox ? `M${from}-.45h${length}v.9H${from}z` : `m${from - (ends[path] ?? 0)} 0h${length}`;
    paths[path] = (paths[path] ?? '') + drawn;
    ends[path] = at;
  }
  return paths;
}
