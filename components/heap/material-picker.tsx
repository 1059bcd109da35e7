'use client';
import { Select } from '@/components/ui/field';
import { COMMON_MATERIALS } from '@/lib/analysis/common-materials';
import { ofCommon, type OwnMaterial } from '@/lib/analysis/material-book';
import { decimal } from '@/lib/units/format';

const SOURCE = { table: 'table', memory: 'from memory' } as const;

/** Materials whose figures are known, own ones first, each with what it is. */
export function MaterialPicker({
  label,
  own,
  value,
  onChange,
}: {
  label: string;
  own: readonly OwnMaterial[];
  value: string;
  onChange: (name: string) => void;
}) {
  const told = ({ carbon, nitrogen, moisture }: { carbon: number; nitrogen: number; moisture: number }) =>
    `${nitrogen === 0 ? 'no nitrogen' : `${decimal(carbon / nitrogen, 0)} : 1`}, ${decimal(moisture * 100, 0)} % water`;
  return (
    <Select
      label={label}
      hint="Typical figures of the On-Farm Composting Handbook (NRAES-54), after a university’s public table or from memory."
      value={value}
      onChange={(event) => onChange(event.target.value)}
    >
      {own.length === 0 ? null : (
        <optgroup label="Your own">
          {own.map((one) => (
            <option key={one.name} value={one.name}>
              {one.name}: {told(one)}
            </option>
          ))}
        </optgroup>
      )}
      <optgroup label="Common ones">
        {COMMON_MATERIALS.map((one) => (
          <option key={one.name} value={one.name}>
            {one.name}: {told(ofCommon(one))}, {SOURCE[one.source]}
          </option>
        ))}
      </optgroup>
    </Select>
  );
}
