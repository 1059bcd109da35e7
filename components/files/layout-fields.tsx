'use client';
import { NumberField, Select } from '@/components/ui/field';
import { ENCODINGS, DELIMITERS } from '@/lib/analysis/logger-layout';
import type { ImportPreview } from '@/lib/schema/import';
import { Choice } from './layout-choice';
import { TimeFields } from './time-fields';

type Layout = ImportPreview['layout'];

/** How the file is read as a whole. Fields of text act when they are left, so that half a zone's name is not asked for. */
export function LayoutFields({
  layout,
  heads,
  onChange,
}: {
  layout: Layout;
  heads: ImportPreview['heads'];
  onChange: (layout: Layout) => void;
}) {
  const set = (change: Partial<Layout>) => onChange({ ...layout, ...change });
  const named = (column: number) => heads[column] || `Column ${column + 1}`;
  const chosen = [...layout.timeColumns, layout.sensorColumn ?? 0];
  const places = [...new Set([...heads.keys(), ...chosen])].sort((a, b) => a - b);
  return (
    <div className="grid grid-cols-1 gap-3 sm:grid-cols-2 lg:grid-cols-4">
      <Choice
        label="Encoding"
        value={layout.encoding}
        values={ENCODINGS}
        onChoose={(encoding) => set({ encoding })}
      />
      <Choice
        label="Columns are parted by"
        value={layout.delimiter}
        values={DELIMITERS}
        onChoose={(delimiter) => set({ delimiter })}
      />
      <Choice
        label="Decimals"
        value={layout.decimal}
        values={['.', ','] as const}
        onChoose={(decimal) => set({ decimal })}
      />
      <NumberField
        key={layout.headLines}
        label="Lines before the first reading"
        defaultValue={layout.headLines}
        onBlur={(event) => {
          const lines = Number(event.target.value);
          if (Number.isInteger(lines) && lines >= 0 && lines !== layout.headLines) set({ headLines: lines });
        }}
      />
      <Select
        label="The time is in"
        value={layout.timeColumns.join()}
        onChange={(event) => set({ timeColumns: event.target.value.split(',').map(Number) })}
      >
        {places.flatMap((column) => [
          <option key={column} value={column}>
            {named(column)}
          </option>,
          <option key={`${column}+`} value={`${column},${column + 1}`}>
            {named(column)}, time of day beside it
          </option>,
          ...(column === 0
            ? []
            : [
                <option key={`${column}-`} value={`${column},${column - 1}`}>
                  {named(column)}, time of day before it
                </option>,
              ]),
        ])}
      </Select>
      <Select
        label="The sensor is named in"
        hint="Where each line holds what one sensor told."
        value={layout.sensorColumn ?? ''}
        onChange={(event) => {
          const { sensorColumn: _, ...rest } = layout;
          const chosen = event.target.value === '' ? {} : { sensorColumn: Number(event.target.value) };
          // points were put to other columns than there will be
          onChange({ ...rest, ...chosen, columns: [] });
        }}
      >
        <option value="">no column: each sensor has its own</option>
        {places.map((column) => (
          <option key={column} value={column}>
            {named(column)}
          </option>
        ))}
      </Select>
      <TimeFields time={layout.time} onChange={(time) => set({ time })} />
    </div>
  );
}
