'use client';
import { Select } from '@/components/ui/field';
import type { Point } from '@/lib/schema/yard-view';

/** One field a point: which point there stands for it. Those of another unit can be seen, not taken. */
export function CopyPoints({
  used,
  there,
  errors,
  onChoose,
}: {
  used: { key: string; point: Point | undefined; there: string }[];
  there: Point[];
  errors: Record<string, string>;
  onChoose: (key: string, there: string) => void;
}) {
  return (
    <fieldset className="flex flex-col gap-3">
      <legend className="mb-2 font-semibold">What stands there for …</legend>
      {used.map(({ key, point, there: chosen }, place) => {
        const fits = (other: Point) => point === undefined || other.unit === point.unit;
        const hasFit = there.some(fits);
        return (
          <Select
            key={key}
            label={point?.name ?? `${key} (no longer there)`}
            value={chosen}
            error={errors[`points.${place}.to`] ?? errors[`points.${place}.from`]}
            hint={
              hasFit || there.length === 0
                ? undefined
                : `That house has no point in ${point?.unit === 'Cel' ? '°C or °F' : (point?.unit ?? '')}: add one in its Wiring.`
            }
            onChange={(event) => onChoose(key, event.target.value)}
          >
            <option value="">Choose …</option>
            {there.map((other) => (
              <option key={other.key} value={other.key} disabled={!fits(other)}>
                {other.name}
                {fits(other) ? '' : ' (another unit)'}
              </option>
            ))}
          </Select>
        );
      })}
      {errors.points === undefined ? null : (
        <p role="alert" className="font-semibold text-alarm">
          {errors.points}
        </p>
      )}
    </fieldset>
  );
}
