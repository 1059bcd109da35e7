/**
 * The 97.5 % point of Student's t: a mean ± this many of its standard errors is its 95 % interval.
 *
 * G. W. Hill, "Algorithm 396: Student's t-quantiles", Communications of the ACM 13 (1970) 619–620; good to six figures.
 * @param degrees of freedom; a fraction is rounded down, which widens the interval
 * @throws RangeError under one degree of freedom
 * @example t95(10) is 2.228, t95(1) is 12.706
 */
export function t95(degrees: number): number {
  const n = Math.floor(degrees);
  if (!(n >= 1)) throw new RangeError(`Student’s t has no ${degrees} degrees of freedom`);
  if (n === 1) return 1 / Math.tan((TAIL * Math.PI) / 2);
  if (n === 2) return Math.sqrt(2 / (TAIL * (2 - TAIL)) - 2);
  const a = 1 / (n - 0.5);
  const b = 48 / a ** 2;
  let c = (((20_700 * a) / b - 98) * a - 16) * a + 96.36;
  const d = ((94.5 / (b + c) - 3) / b + 1) * Math.sqrt((a * Math.PI) / 2) * n;
  let y = (d * TAIL) ** (2 / n);
  if (y > 0.05 + a) {
    if (n < 5) c += 0.3 * (n - 4.5) * (NORMAL + 0.6);
    c = (((0.05 * d * NORMAL - 5) * NORMAL - 7) * NORMAL - 2) * NORMAL + b + c;
    const z = NORMAL ** 2;
    y = (((((0.4 * z + 6.3) * z + 36) * z + 94.5) / c - z - 3) / b + 1) * NORMAL;
    y = Math.expm1(a * y ** 2);
  } else {
    const near = (n + 6) / (n * y) - 0.089 * d - 0.822;
    y = ((1 / (near * (n + 2) * 3) + 0.5 / (n + 4)) * y - 1) * ((n + 1) / (n + 2)) + 1 / y;
  }
  return Math.sqrt(n * y);
}

/** Both tails together, and the normal deviate of one of them. */
const TAIL = 0.05;
const NORMAL = -1.959_963_984_540_054;
