/**
 * Exact tail chances of rank statistics, by counting all orders by hand or from any table (Hollander and Wolfe,
 * Nonparametric Statistical Methods): of 5! orders one has no pair reversed; of C(8,4) = 70 choices one has the least sum.
 */
export const fullyApart = [
  { before: 3, after: 3, p: 2 / 20 },
  { before: 4, after: 4, p: 2 / 70 },
  { before: 7, after: 7, p: 2 / 3432 },
  { before: 2, after: 7, p: 2 / 36 },
];
