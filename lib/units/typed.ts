/** Reads what a person typed into a field for a number. */

/**
 * A decimal point or a decimal comma, a hyphen or a true minus, spaces round it. Anything else is not a number: null.
 * Thousands separators are refused rather than guessed, since 1,500 is 1.5 to one reader and 1500 to another: a comma
 * is always a decimal comma.
 * @example numberTyped('−4,5') === -4.5
 */
export function numberTyped(text: string): number | null {
  const plain = text.trim().replace(/^[−–]/, '-').replace(',', '.');
  if (!/^[+-]?(\d+\.?\d*|\.\d+)$/.test(plain)) return null;
  const value = Number(plain);
  return Number.isFinite(value) ? value : null;
}

/**
 * Minutes as people type them: `40`, `1:30` (hours and minutes), `1 h 30`, `40 min`, `90 s`. Answers whole seconds, or
 * null. A bare number is minutes.
 * @example secondsTyped('1 h 05') === 3900
 */
export function secondsTyped(text: string): number | null {
  const plain = text.trim().toLowerCase();
  const clock = /^(\d{1,3}):([0-5]\d)$/.exec(plain);
  if (clock) return Number(clock[1]) * 3600 + Number(clock[2]) * 60;
  const said = /^(?:(\d+(?:[.,]\d+)?)\s*h)?\s*(?:(\d+(?:[.,]\d+)?)\s*(?:m|min)?)?\s*(?:(\d+)\s*s)?$/.exec(
    plain,
  );
  if (!said || plain === '') return null;
  // `90 s` alone: the minutes' part must not swallow the 90
  const bare = /^(\d+)\s*s$/.exec(plain);
  if (bare) return Number(bare[1]);
  const [hours, minutes, seconds] = [said[1], said[2], said[3]].map((part) =>
    Number((part ?? '0').replace(',', '.')),
  );
  const total = (hours ?? 0) * 3600 + (minutes ?? 0) * 60 + (seconds ?? 0);
  return Number.isFinite(total) ? Math.round(total) : null;
}
