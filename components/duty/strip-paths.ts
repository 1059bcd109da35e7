/**
 * A channel's night as few short paths. Four hundred nights have some ten thousand runs and rests; a shape for each would
 * cost a phone a second, so all runs of a night are one path of strokes as high as the strip: `m` skips, `h` draws.
 */
import type { StripSpan } from '@/lib/analysis/nights';

export interface StripPaths {
  /** Length of the whole night, s: 23 to 25 h. */
  length: number;
  run: string;
  rest: string;
  held: string;
  /** By hand, on and off: outlined, so these are closed boxes. */
  handOn: string;
  handOff: string;
}

/** In whole seconds from the night's first noon. @param length of the whole night; one that lasts ends early */
export function stripPaths(spans: readonly StripSpan[], length: number): StripPaths {
  const of = (kind: StripSpan[0]) => spans.filter((span) => span[0] === kind);
  const hand = of('hand');
  return {
    length,
    run: strokes(of('run')),
    rest: strokes(of('rest')),
    held: strokes(of('held')),
    handOn: boxes(hand.filter(([, , , on]) => on)),
    handOff: boxes(hand.filter(([, , , on]) => !on)),
  };
}

/** @example strokes of 600–1800 and 3600–4200: 'm600 0h1200m1800 0h600' */
function strokes(spans: readonly StripSpan[]): string {
  let at = 0;
  return spans
    .map(([, from, to]) => {
      const skipped = from - at;
      at = to;
      return `m${skipped} 0h${to - from}`;
    })
    .join('');
}

function boxes(spans: readonly StripSpan[]): string {
  return spans.map(([, from, to]) => `M${from}-.45h${to - from}v.9H${from}z`).join('');
}
