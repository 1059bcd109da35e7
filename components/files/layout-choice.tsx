'use client';
import { Select } from '@/components/ui/field';

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
  serial: 'days since 1900, as in a spreadsheet',
  'by-order': 'by the order of the lines',
  first: 'as the first',
  second: 'as the second',
  'leave-out': 'left out',
  'before-gap': 'as the clock before the gap',
};

/** One of the closed lists by which a file is read. */
export function Choice<Value extends string>({
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
