/**
 * A sum or difference of decimal figures as it is on paper: 4.6 − 0.6 is 4, not 3.9999999999999996, and 8.2 − 5.2 is not
 * under 3. To a billionth, which no sensor tells.
 */
export const plain = (value: number): number => Math.round(value * 1e9) / 1e9;
