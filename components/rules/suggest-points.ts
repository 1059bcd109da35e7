/** Which point of another house most likely stands for a point here. Only a suggestion: a person looks at each. */
import type { Point } from '@/lib/schema/yard-view';

/**
 * The unit must be the same. Then the same key, which people give on purpose; else the only point of the same role, since
 * of two benches nobody but a grower knows which is meant; else the same name. Null: none is likely.
 */
export function suggestPoint(wanted: Point | undefined, there: readonly Point[]): string | null {
  if (wanted === undefined) return null;
  const fitting = there.filter((point) => point.unit === wanted.unit);
  const sameRole = fitting.filter((point) => point.role === wanted.role && wanted.role !== 'other');
  const found =
    fitting.find((point) => point.key === wanted.key) ??
    (sameRole.length === 1 ? sameRole[0] : undefined) ??
    fitting.find((point) => point.name.toLowerCase() === wanted.name.toLowerCase());
  return found?.key ?? null;
}
