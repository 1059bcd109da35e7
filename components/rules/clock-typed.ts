/**
 * A time of day as people type it, as `HH:MM`; null where it is none. What the sun sets is left to the schema.
 * @example clockTyped('6.30 pm') === '18:30', clockTyped('8') === '08:00'
 */
export function clockTyped(text: string): string | null {
  const match = /^(\d{1,2})(?:[:.h](\d{2}))?\s*([ap])?\.?\s*(?:m\.?)?$/i.exec(text.trim());
  if (!match) return null;
  const half = match[3]?.toLowerCase();
  const said = Number(match[1]);
  const minute = Number(match[2] ?? 0);
  if (minute > 59 || (half !== undefined && (said < 1 || said > 12))) return null;
  const hour = half === undefined ? said : (said % 12) + (half === 'p' ? 12 : 0);
  // 24:00 is how many write the end of a day
  if (hour === 24 && minute === 0) return '00:00';
  return hour > 23 ? null : `${String(hour).padStart(2, '0')}:${String(minute).padStart(2, '0')}`;
}
