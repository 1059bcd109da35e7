import { type DateOrder, readTime } from './logger-time';

/**
 * Whether lines run from the newest to the oldest: most of the steps between them decide, so that the step back where the
 * clock changes, or a line out of its place, does not.
 */
export function runsBackward(texts: readonly string[], order: DateOrder): boolean {
  let back = 0;
  let last: number | null = null;
  for (const text of texts) {
    const read = readTime(text, order);
    if (read === null) continue;
    const at = 'wall' in read ? read.wall : read.instant;
    if (last !== null) back += Math.sign(last - at);
    last = at;
  }
  return back > 0;
}

/**
 * Of a time that comes twice, which one goes on the way the file runs.
 * @param first earlier of its two instants, epoch ms
 * @param lastAt of the line before; undefined at the first
 */
export function isFirstPass(
  first: number,
  second: number,
  lastAt: number | undefined,
  isBackward: boolean,
): boolean {
  if (lastAt === undefined) return !isBackward;
  return isBackward ? second >= lastAt : first > lastAt;
}
