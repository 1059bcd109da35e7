/** Waits between tries at a link that fails: at random under a bound that doubles, so that many do not come at once. */
import { randomInt } from 'node:crypto';

const LEAST_MS = 1000;
const MOST_MS = 30_000;

export class BackOff {
  private tries = 0;

  /** @param chance from 0 to under 1 */
  constructor(private readonly chance: () => number = () => randomInt(2 ** 32) / 2 ** 32) {}

  /** Real ms until the next try: 1 to 30 s. */
  next(): number {
    const bound = Math.min(MOST_MS, 2 * LEAST_MS * 2 ** Math.min(this.tries, 10));
    this.tries += 1;
    return LEAST_MS + this.chance() * (bound - LEAST_MS);
  }

  /** It works: the next failure is a first one again. */
  reset(): void {
    this.tries = 0;
  }
}
