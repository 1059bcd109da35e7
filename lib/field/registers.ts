/**
 * From registers of a board to values, by Modbus Application Protocol V1.1b3: a register is 16 bits, its high byte first.
 * Which of two registers comes first is not part of that protocol, so a row says it.
 */
import type { Register } from '@/lib/schema/bus';

export type Place = Pick<Register, 'table' | 'address' | 'type'>;
export type Decoding = Pick<Register, 'type' | 'wordOrder' | 'scale' | 'offset'>;

/** A run of neighbours in one table, to be asked for at once. */
export interface Block<Row extends Place = Register> {
  table: Register['table'];
  address: number;
  count: number;
  rows: { row: Row; at: number }[];
}

/** The protocol's own limits of one request, sections 6.1 to 6.4. */
const MOST = { coil: 2000, discrete: 2000, input: 125, holding: 125 } as const;

/** Registers, or bits, that a value takes. @example wordsOf('f32') === 2 */
export function wordsOf(type: Register['type']): 1 | 2 {
  return type === 'u32' || type === 's32' || type === 'f32' ? 2 : 1;
}

/**
 * Rows by what can be asked for in one request. Only true neighbours are joined: many boards answer a request that spans
 * an address which they do not have with an exception.
 */
export function blocksOf<Row extends Place>(rows: readonly Row[]): Block<Row>[] {
  const blocks: Block<Row>[] = [];
  const ordered = [...rows].sort((a, b) => a.table.localeCompare(b.table) || a.address - b.address);
  for (const row of ordered) {
    const last = blocks.at(-1);
    const end = row.address + wordsOf(row.type);
    const joins =
      last !== undefined &&
      last.table === row.table &&
      row.address <= last.address + last.count &&
      end - last.address <= MOST[row.table];
    if (joins) {
      last.rows.push({ row, at: row.address - last.address });
      last.count = Math.max(last.count, end - last.address);
    } else {
      const { table, address } = row;
      blocks.push({ table, address, count: wordsOf(row.type), rows: [{ row, at: 0 }] });
    }
  }
  return blocks;
}

/**
 * What registers hold, before scale and offset.
 * @param words as the board gave them, 0 to 65535 each, one or two as `wordsOf` says
 * @returns NaN and infinities too, where the board's own 32 bits say so
 * @example rawOf('s16', 'high-first', [0xffff]) === -1
 */
export function rawOf(
  type: Register['type'],
  order: Register['wordOrder'],
  words: readonly number[],
): number {
  const [first = 0, second = 0] = words;
  const view = new DataView(new ArrayBuffer(4));
  if (wordsOf(type) === 1) view.setUint16(0, first);
  else {
    view.setUint16(0, order === 'high-first' ? first : second);
    view.setUint16(2, order === 'high-first' ? second : first);
  }
  switch (type) {
    case 'bit':
    case 'u16':
      return view.getUint16(0);
    case 's16':
      return view.getInt16(0);
    case 'u32':
      return view.getUint32(0);
    case 's32':
      return view.getInt32(0);
    case 'f32':
      return view.getFloat32(0);
  }
}

/** raw × scale + offset, in the row's unit. @example valueOf({ …, type: 's16', scale: 0.1 }, [234]) === 23.4 */
export function valueOf({ type, wordOrder, scale, offset }: Decoding, words: readonly number[]): number {
  const value = rawOf(type, wordOrder, words) * scale + offset;
  // 234 × 0.1 is 23.400000000000002 in binary; what a board shows has far fewer digits than the twelve kept
  return Number.isFinite(value) ? Number(value.toPrecision(12)) : value;
}
