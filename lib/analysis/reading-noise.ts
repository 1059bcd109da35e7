/** How readings scatter, and whether their errors follow each other. */

/** K: of the differences between neighbours, but no less than the probe's own step allows. */
export function stepNoise(y: readonly number[]): number {
  const differences = y.slice(1).map((value, i) => Math.abs(value - (y[i] ?? value)));
  const steps = differences.filter((one) => one > 1e-9);
  const rms = Math.sqrt(differences.reduce((sum, one) => sum + one * one, 0) / differences.length / 2);
  return Math.max(rms, Math.min(Infinity, ...steps.map((one) => one / Math.sqrt(12))) || 0, 1e-6);
}

/** By how much the variance of sums exceeds that of independent errors; 1 where they do not show that they follow each other. */
export function excess(errors: readonly number[]): number {
  const n = errors.length;
  const square = errors.reduce((sum, error) => sum + error * error, 0);
  if (square === 0) return 1;
  const correlation = (lag: number) =>
    errors.slice(lag).reduce((sum, error, i) => sum + error * (errors[i] ?? 0), 0) / square;
  if (correlation(1) < 2 / Math.sqrt(n)) return 1;
  const most = Math.min(Math.floor(n / 4), 20);
  let sum = 1;
  for (let lag = 1; lag <= most; lag += 1) {
    const rho = correlation(lag);
    if (rho <= 0) break;
    sum += 2 * (1 - lag / (most + 1)) * rho;
  }
  return sum;
}
