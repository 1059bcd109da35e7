'use client';
import { useFacts } from './context';

/** Options of a select: the points of the house that are kept in one of the units. */
export function PointChoices({ units, none }: { units?: readonly string[]; none?: string }) {
  const { points } = useFacts();
  return (
    <>
      <option value="">{none ?? 'Choose …'}</option>
      {points
        .filter((point) => units === undefined || units.includes(point.unit))
        .map((point) => (
          <option key={point.key} value={point.key}>
            {point.name}
          </option>
        ))}
    </>
  );
}
