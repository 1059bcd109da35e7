'use client';
import { NumberField, Select, TextField } from '@/components/ui/field';
import { ENCODINGS, DELIMITERS } from '@/lib/analysis/logger-layout';
import { DATE_ORDERS, SKIPPED, TWICE } from '@/lib/analysis/logger-time';
import type { ImportPreview } from '@/lib/schema/import';

type Layout = ImportPreview['layout'];

const WORDS: Record<string, string> = {
  'utf-8': 'UTF-8',
  'utf-16le': 'UTF-16',
  'utf-16be': 'UTF-16, big-endian',
  'windows-1252': 'Windows-1252',
  ',': 'comma',
  ';': 'semicolon',
  '\t': 'tab',
  '|': 'upright bar',
  '.': 'point: 4.5',
  ymd: 'year, month, day',
  dmy: 'day, month, year',
  mdy: 'month, day, year',
  seconds: 'seconds since 1970',
  milliseconds: 'milliseconds since 1970',
  'by-order': 'by the order of the lines',
  first: 'as the first',
  second: 'as the second',
  'leave-out': 'left out',
  'before-gap': 'as the clock before the gap',
};

function Choice<Value extends string>({
  label,
  value,
  values,
  onChoose,
}: {
  label: string;
  value: Value;
  values: readonly Value[];
  onChoose: (value: Value) => void;
}) {
  return (
    <Select
      label={label}
      value={value}
      onChange={(event) => {
        const chosen = values.find((one) => one === event.target.value);
        if (chosen !== undefined) onChoose(chosen);
      }}
    >
      {values.map((one) => (
        <option key={one} value={one}>
          {label === 'Decimals' && one === ',' ? 'comma: 4,5' : (WORDS[one] ?? one)}
        </option>
      ))}
    </Select>
  );
}

/** How the file is read as a whole. Fields of text act when they are left, so that half a zone's name is not asked for. */
export function LayoutFields({
  layout,
  columns,
  onChange,
}: {
  layout: Layout;
  columns: ImportPreview['columns'];
  onChange: (layout: Layout) => void;
}) {
  const { time } = layout;
  const set = (change: Partial<Layout>) => onChange({ ...layout, ...change });
  const setTime = (change: Partial<Layout['time']>) => set({ time: { ...time, ...change } });
  const named = (column: number) =>
    columns.find((one) => one.column === column)?.head || `Column ${column + 1}`;
  const places = [...new Set([...columns.map((one) => one.column), ...layout.timeColumns])].sort(
    (a, b) => a - b,
  );
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
        ])}
      </Select>
      <Choice
        label="Dates are"
        value={time.order}
        values={DATE_ORDERS}
        onChoose={(order) => setTime({ order })}
      />
      <TextField
        key={time.zone}
        label="Zone of the logger’s clock"
        hint="Times that tell their own offset keep it."
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
    </div>
  );
}
