/** An instant as it stands in data: epoch ms in the core, ISO 8601 on the wire. Null for anything else. */
export function becauseInstant(value: unknown): number | null {
  if (typeof value === 'number') return Number.isFinite(value) ? value : null;
  if (typeof value !== 'string') return null;
  const at = Date.parse(value);
  return Number.isNaN(at) ? null : at;
}
