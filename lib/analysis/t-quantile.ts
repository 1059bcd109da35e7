/** 97.5 % points of Student's t for 1 to 10 degrees of freedom: any table, such as Abramowitz and Stegun, table 26.10. */
const FEW = [12.7062, 4.30265, 3.18245, 2.77645, 2.57058, 2.44691, 2.36462, 2.306, 2.26216, 2.22814];
const Z = 1.959964;

/**
 * Half the width of a two-sided 95 % interval, in deviations, where the deviation has so many degrees of freedom: the
 * table's up to 10, beyond by the expansion of Abramowitz and Stegun, 26.7.5, to 2 in 100 000.
 * @example tQuantile(2) is 4.30265
 */
export function tQuantile(freedom: number): number {
  const few = FEW[Math.max(1, Math.floor(freedom)) - 1];
  if (few !== undefined) return few;
  const [z2, v] = [Z * Z, freedom];
  return (
    Z +
    (Z * (z2 + 1)) / (4 * v) +
    (Z * (5 * z2 ** 2 + 16 * z2 + 3)) / (96 * v ** 2) +
    (Z * (3 * z2 ** 3 + 19 * z2 ** 2 + 17 * z2 - 15)) / (384 * v ** 3)
  );
}
