'use client';
import { useId } from 'react';
import { Button } from '@/components/ui/button';
import { NumberField, Select, TextField } from '@/components/ui/field';
import { COMMON_MATERIALS } from '@/lib/analysis/common-materials';
import { emptyMaterial, type MaterialDraft } from './entry-draft';

export function MaterialFields({
  rows,
  errors,
  own = [],
  onChange,
}: {
  rows: MaterialDraft[];
  /** By path of the body, whose rows are those that were filled in. */
  errors: Record<string, string>;
  /** Materials of the holding's own, offered first. */
  own?: readonly { name: string }[];
  onChange: (rows: MaterialDraft[]) => void;
}) {
  const list = useId();
  const change = (id: number, to: Partial<MaterialDraft>) =>
    onChange(rows.map((row) => (row.id === id ? { ...row, ...to } : row)));
  const filled = rows.filter((row) => row.material.trim() !== '' || row.amount.trim() !== '');
  return (
    <fieldset className="flex flex-col gap-2">
      <legend className="pb-1 font-semibold">Materials</legend>
      <datalist id={list}>
        {/* offered while typing; any other name is as good */}
        {[...own, ...COMMON_MATERIALS].map(({ name }) => (
          <option key={name} value={name} />
        ))}
      </datalist>
      {rows.map((row, index) => {
        const place = filled.indexOf(row);
        const error = (field: string) => errors[`materials.${place}.${field}`];
        const number = index + 1;
        return (
          <div key={row.id} className="grid grid-cols-[minmax(0,1fr)_6.5rem_5rem] items-start gap-2">
            <TextField
              label={`Material ${number}`}
              labelHidden={index > 0}
              list={list}
              value={row.material}
              error={error('material')}
              onChange={(event) => change(row.id, { material: event.target.value })}
            />
            <NumberField
              label={index > 0 ? `Amount of material ${number}` : 'Amount'}
              labelHidden={index > 0}
              value={row.amount}
              error={error('kilograms') ?? error('litres')}
              onChange={(event) => change(row.id, { amount: event.target.value })}
            />
            <Select
              label={index > 0 ? `Unit of material ${number}` : 'Unit'}
              labelHidden={index > 0}
              value={row.unit}
              onChange={(event) => change(row.id, { unit: event.target.value === 'L' ? 'L' : 'kg' })}
            >
              <option value="kg">kg</option>
              <option value="L">L</option>
            </Select>
          </div>
        );
      })}
      {rows.length < 20 ? (
        <Button
          className="self-start"
          onClick={() => onChange([...rows, emptyMaterial(Math.max(-1, ...rows.map((row) => row.id)) + 1)])}
        >
          One more material
        </Button>
      ) : null}
    </fieldset>
  );
}
