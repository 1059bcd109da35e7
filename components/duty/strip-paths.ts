/**
 * A channel's night as few short paths. Four hundred nights have some ten thousand runs and rests; a shape for each would
 * cost a phone a second, so all runs of a night are one path of strokes as high as the strip: `m` skips, `h` draws.
 */
import type { StripSpan } from '@/lib/analysis/nights';

/** What is usual, or nothing, is left out: the paths of a year go over a slow line. */
export interface StripPaths {
  /** Length of the whole night, s, where it is not 24 h. */
  length?: number;
  run?: string;
  rest?: string;
  held?: string;
  /** By hand, on and off: outlined, so these are closed boxes. */
  handOn?: string;
  handOff?: string;
}

export const USUAL_LENGTH = 86_400;

/** In whole seconds from the night's first noon. @param length of the whole night; one that lasts ends early */
export function stripPaths(spans: readonly StripSpan[], length: number): StripPaths {
  const of = (kind: StripSpan[0], on?: boolean) =>
    joined(spans.filter((span) => span[0] === kind && (on === undefined || span[3] === on)));
  const paths = {
    run: strokes(of('run')),
    rest: strokes(of('rest')),
    held: strokes(of('held')),
    handOn: boxes(of('hand', true)),
    handOff: boxes(of('hand', false)),
  };
  return {
    ...(length === USUAL_LENGTH ? {} : { length }),
    ...Object.fromEntries(Object.entries(paths).filter(([, path]) => path !== '')),
  };
}

/** Spans that meet are one on paper, though different reasons decided them; one of no length draws nothing. */
function joined(spans: readonly StripSpan[]): [from: number, to: number][] {
  const parts: [number, number][] = [];
  for (const [, from, to] of spans) {
    const last = parts.at(-1);
    if (to <= from) continue;
    if (last !== undefined && last[1] === from) last[1] = to;
    else parts.push([from, to]);
  }
  return parts;
}

/** @example strokes of 600–1800 and 3600–4200: 'm600 0h1200m1800 0h600' */
function strokes(parts: readonly [number, number][]): string {
  let at = 0;
  return parts
    .map(([from, to]) => {
      const skipped = from - at;
      at = to;
      return `m${skipped} 0h${to - from}`;
    })
    .join('');
}

function boxes(parts: readonly [number, number][]): string {
  return parts.map(([from, to]) => `M${from}-.45h${to - from}v.9H${from}z`).join('');
}
