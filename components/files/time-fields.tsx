'use client';
import { TextField } from '@/components/ui/field';
import { DATE_ORDERS, SKIPPED, TWICE } from '@/lib/analysis/logger-time';
import type { ImportPreview } from '@/lib/schema/import';
import { Choice } from './layout-choice';

type Time = ImportPreview['layout']['time'];

/** How the times of a file are read; fields of `LayoutFields`' grid. */
export function TimeFields({ time, onChange }: { time: Time; onChange: (time: Time) => void }) {
  const setTime = (change: Partial<Time>) => onChange({ ...time, ...change });
  return (
    <>
      <Choice
        label="Dates are"
        value={time.order}
        values={DATE_ORDERS}
        onChoose={(order) => setTime({ order })}
      />
      <TextField
        key={time.zone}
        label="Zone of the logger’s clock"
        hint="Or a fixed offset, such as UTC+01:00, of a clock that no summer moves. Times that tell their own offset keep it."
        defaultValue={time.zone}
        onBlur={(event) => {
          const zone = event.target.value.trim();
          if (zone !== '' && zone !== time.zone) setTime({ zone });
        }}
      />
      <Choice
        label="A time that comes twice is read"
        value={time.twice}
        values={TWICE}
        onChoose={(twice) => setTime({ twice })}
      />
      <Choice
        label="A time that is skipped is read"
        value={time.skipped}
        values={SKIPPED}
        onChoose={(skipped) => setTime({ skipped })}
      />
    </>
  );
}
