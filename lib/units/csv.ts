/** Cells and lines of comma-separated values (RFC 4180). */
export type CsvCell = string | number | boolean | null;

/** What a spreadsheet would take for a formula is quoted out of it; a number stays a number, negative ones too. */
export function csvCell(value: CsvCell): string {
  if (value === null) return '';
  if (typeof value !== 'string') return String(value);
  const safe = /^[=+\-@\t\r]/.test(value) ? `'${value}` : value;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** One line with its end. */
export function csvLine(cells: readonly CsvCell[]): string {
  return `${cells.map(csvCell).join(',')}\r\n`;
}
