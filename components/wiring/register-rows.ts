/** The register map as it is typed: every field text, and what it comes to. */
import { ADDRESS_LAST, type Register } from '@/lib/schema/bus';
import { fieldValue } from '@/lib/units/fields';
import type { Preferences } from '@/lib/units/preferences';

export interface RegisterRow {
  /** Of the row in the form; a row keeps it when one before it goes. */
  id: number;
  point: string;
  table: string;
  address: string;
  type: string;
  wordOrder: string;
  scale: string;
  offset: string;
  unit: string;
}

type Errors = Record<string, string>;

const POWER = /^[+-]?\d+(\.\d+)?e[+-]?\d{1,2}$/i;

export function rowsOf(registers: readonly Register[]): RegisterRow[] {
  return registers.map(({ address, scale, offset, ...row }, id) => ({
    ...{ ...row, id },
    ...{ address: String(address), scale: String(scale), offset: String(offset) },
  }));
}

/** A row after the others: the next address of the same table, since values mostly lie side by side. */
export function rowAfter(rows: readonly RegisterRow[]): RegisterRow {
  const last = rows.at(-1);
  const id = Math.max(-1, ...rows.map((row) => row.id)) + 1;
  if (last === undefined) {
    const scaled = { scale: '0.1', offset: '0', unit: 'Cel' };
    return { id, point: '', table: 'input', address: '0', type: 's16', wordOrder: 'high-first', ...scaled };
  }
  const next = Number(last.address) + (isDouble(last.type) ? 2 : 1);
  return { ...last, id, point: '', address: Number.isInteger(next) ? String(next) : '' };
}

export const isDouble = (type: string) => type.endsWith('32');
export const isBits = (table: string) => table === 'coil' || table === 'discrete';

/** A coil is a bit and a register is none: what no longer fits is changed with the table. */
export function withTable(row: RegisterRow, table: string): RegisterRow {
  if (isBits(table)) return { ...row, table, type: 'bit', scale: '1', offset: '0', unit: '/' };
  return { ...row, table, type: row.type === 'bit' ? 's16' : row.type };
}

/** @returns the row as it is sent but for its point, and by field what cannot be read of it */
export function bodyOfRow(row: RegisterRow, preferences: Preferences): { body: object; errors: Errors } {
  const errors: Errors = {};
  const address = fieldValue(row.address, 'whole', preferences);
  if (address === null || address < 0 || address > ADDRESS_LAST)
    errors['address'] = `Give a whole number from 0 to ${ADDRESS_LAST}, as it is on the wire.`;
  const number = (field: 'scale' | 'offset') => {
    const typed = row[field].trim();
    // very small scales are kept, and so shown, as 1e-7
    const value = POWER.test(typed) ? Number(typed) : fieldValue(typed, 'number', preferences);
    if (value === null) errors[field] = 'Give a number, such as 0.1.';
    return value;
  };
  const { table, type, wordOrder, unit } = row;
  const numbers = { address, scale: number('scale'), offset: number('offset') };
  return { body: { table, type, wordOrder, unit: unit.trim(), ...numbers }, errors };
}

/** All rows, with errors as the interface names them: `registers.0.address`. */
export function bodyOfRows(
  rows: readonly RegisterRow[],
  preferences: Preferences,
): { body: object[]; errors: Errors } {
  const read = rows.map((row) => bodyOfRow(row, preferences));
  const errors = read.flatMap((one, place) =>
    Object.entries(one.errors).map(([field, why]) => [`registers.${place}.${field}`, why] as const),
  );
  const body = read.map((one, place) => ({ point: rows[place]?.point.trim() ?? '', ...one.body }));
  return { body, errors: Object.fromEntries(errors) };
}
