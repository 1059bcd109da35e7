/** The straight line of least squares. */

export interface Line {
  slope: number;
  at0: number;
  /** Deviation of one value about the line, with n − 2 degrees of freedom; null for two values. */
  sd: number | null;
  /** Standard error of the slope; null for two values. */
  slopeSd: number | null;
}

/** Null for fewer than two values, or all at one x. */
export function lineThrough(values: readonly { x: number; y: number }[]): Line | null {
  const n = values.length;
  if (n < 2) return null;
  const meanX = values.reduce((sum, one) => sum + one.x, 0) / n;
  const meanY = values.reduce((sum, one) => sum + one.y, 0) / n;
  const sxx = values.reduce((sum, one) => sum + (one.x - meanX) ** 2, 0);
  if (sxx === 0) return null;
  const slope = values.reduce((sum, one) => sum + (one.x - meanX) * (one.y - meanY), 0) / sxx;
  const at0 = meanY - slope * meanX;
  if (n === 2) return { slope, at0, sd: null, slopeSd: null };
  const squares = values.reduce((sum, one) => sum + (one.y - at0 - slope * one.x) ** 2, 0);
  const sd = Math.sqrt(squares / (n - 2));
  return { slope, at0, sd, slopeSd: sd / Math.sqrt(sxx) };
}
