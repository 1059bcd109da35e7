/** Small dense matrices, three or four a side, as least squares give them. */

/** The inverse, by elimination with row exchange; null where it is singular to working accuracy. */
export function inverse(a: readonly (readonly number[])[]): number[][] | null {
  const n = a.length;
  const rows = a.map((row, i) => [...row, ...a.map((_, j) => (i === j ? 1 : 0))]);
  const at = (i: number, j: number) => rows[i]?.[j] ?? 0;
  const greatest = Math.max(...a.flatMap((row) => row.map(Math.abs)));
  for (let k = 0; k < n; k += 1) {
    let pivot = k;
    for (let i = k + 1; i < n; i += 1) if (Math.abs(at(i, k)) > Math.abs(at(pivot, k))) pivot = i;
    if (!(Math.abs(at(pivot, k)) > greatest * 1e-15)) return null;
    const [one, other] = [rows[k] ?? [], rows[pivot] ?? []];
    rows[k] = other;
    rows[pivot] = one;
    for (let i = 0; i < n; i += 1) {
      if (i === k) continue;
      const factor = at(i, k) / at(k, k);
      rows[i] = (rows[i] ?? []).map((value, j) => value - factor * at(k, j));
    }
  }
  return rows.map((row, i) => row.slice(n).map((value) => value / at(i, i)));
}

/** Jᵀ J of rows. */
export function normal(rows: readonly (readonly number[])[]): number[][] {
  const n = rows[0]?.length ?? 0;
  const columns = Array.from({ length: n }, (_, j) => j);
  return columns.map((i) =>
    columns.map((j) => rows.reduce((sum, row) => sum + (row[i] ?? 0) * (row[j] ?? 0), 0)),
  );
}
