'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Select, TextField } from '@/components/ui/field';
import { REGISTER_TABLES, REGISTER_TYPES, WORD_ORDERS } from '@/lib/schema/bus';
import { ORDER_WORDS, TABLE_WORDS, testReadWords, TYPE_WORDS } from '@/lib/wording/bus';
import { isBits, isDouble, withTable, type RegisterRow } from './register-rows';
import type { TestReading } from './test-reading';

interface Props {
  row: RegisterRow;
  place: number;
  errors: Record<string, string>;
  /** Id of the list of point keys. */
  points: string;
  change: (row: RegisterRow) => void;
  remove: () => void;
  read: (row: RegisterRow) => Promise<TestReading>;
}

/** One value of a board: where it stands, how it is read, and what it is now. */
export function RegisterFields({ row, place, errors, points, change, remove, read }: Props) {
  const field = (name: keyof RegisterRow, label: string) => ({
    label,
    value: row[name],
    error: errors[`registers.${place}.${name}`],
    onChange: (event: { target: { value: string } }) => change({ ...row, [name]: event.target.value }),
  });
  const types = REGISTER_TYPES.filter((type) => (type === 'bit') === isBits(row.table));
  return (
    <fieldset className="border-t border-line pt-3">
      <legend className="sr-only">Value {place + 1}</legend>
      <div className="grid grid-cols-2 items-start gap-3">
        <TextField {...field('point', 'Point')} list={points} />
        <Select {...field('table', 'Table')} onChange={(event) => change(withTable(row, event.target.value))}>
          {REGISTER_TABLES.map((table) => (
            <option key={table} value={table}>
              {TABLE_WORDS[table]}
            </option>
          ))}
        </Select>
        <TextField {...field('address', 'Address, from 0')} inputMode="numeric" />
        <Select {...field('type', 'Form')}>
          {types.map((type) => (
            <option key={type} value={type}>
              {type}: {TYPE_WORDS[type]}
            </option>
          ))}
        </Select>
        {isDouble(row.type) ? (
          <Select {...field('wordOrder', 'Word order')}>
            {WORD_ORDERS.map((order) => (
              <option key={order} value={order}>
                {ORDER_WORDS[order]}
              </option>
            ))}
          </Select>
        ) : null}
        <TextField {...field('scale', 'Times')} inputMode="decimal" />
        <TextField {...field('offset', 'Plus')} inputMode="decimal" />
        <TextField {...field('unit', 'Unit')} list={`${points}-units`} />
      </div>
      <Reading row={row} place={place} read={read} remove={remove} />
    </fieldset>
  );
}

function Reading({ row, place, read, remove }: Pick<Props, 'row' | 'place' | 'read' | 'remove'>) {
  const [isBusy, setBusy] = useState(false);
  const [said, setSaid] = useState('');
  async function ask() {
    setBusy(true);
    setSaid('');
    const told = await read(row);
    setSaid(typeof told === 'string' ? told : testReadWords(told));
    setBusy(false);
  }
  return (
    <div className="mt-2 flex flex-wrap items-center gap-2">
      <Button busy={isBusy} onClick={() => void ask()}>
        <span>
          Read it now<span className="sr-only">, value {place + 1}</span>
        </span>
      </Button>
      <Button kind="quiet" onClick={remove}>
        <span>
          Remove<span className="sr-only"> value {place + 1}</span>
        </span>
      </Button>
      <p role="status" className="w-full font-semibold wrap-anywhere empty:hidden">
        {said}
      </p>
    </div>
  );
}
