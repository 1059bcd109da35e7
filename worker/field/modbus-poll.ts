/** What is read of a board: its rows block by block, as the pack that a node would have sent. */
import { blocksOf, rawOf, valueOf, wordsOf, type Block } from '@/lib/field/registers';
import type { RefusedRecord } from '@/lib/field/frames';
import type { Register } from '@/lib/schema/bus';
import { placeWords } from '@/lib/wording/bus';
import { BoardException, type ModbusLine } from './modbus-line';

export interface Polled {
  /** SenML records. */
  pack: { n: string; u: string; t: number; v: number }[];
  refused: RefusedRecord[];
}

/**
 * @param nowS app time, Unix seconds
 * @throws Error where the line failed; what was read till then is read again
 */
export async function poll(
  line: ModbusLine,
  registers: readonly Register[],
  nowS: () => number,
): Promise<Polled> {
  const polled: Polled = { pack: [], refused: [] };
  for (const block of blocksOf(registers)) await pollBlock(line, block, nowS, polled);
  return polled;
}

async function pollBlock(line: ModbusLine, block: Block, nowS: () => number, into: Polled): Promise<void> {
  try {
    const words = await line.read(block.table, block.address, block.count);
    const t = nowS();
    for (const { row, at } of block.rows) {
      const v = valueOf(row, words.slice(at, at + wordsOf(row.type)));
      if (Number.isFinite(v)) into.pack.push({ n: row.point, u: row.unit, t, v });
      else into.refused.push({ index: 0, name: row.point, why: `${placeOf(row)} holds no number` });
    }
  } catch (error) {
    if (!(error instanceof BoardException)) throw error;
    const [only, ...others] = block.rows;
    // one address that is not there spoils its neighbours: each is asked for by itself then
    if (only !== undefined && others.length > 0) {
      for (const { row } of block.rows)
        for (const one of blocksOf([row])) await pollBlock(line, one, nowS, into);
    } else if (only !== undefined) {
      into.refused.push({ index: 0, name: only.row.point, why: `${placeOf(only.row)}: ${error.message}` });
    }
  }
}

const placeOf = ({ table, address }: Pick<Register, 'table' | 'address'>) => placeWords(table, address);

export interface ReadOnce {
  words: number[];
  raw: number | null;
  value: number | null;
  why: string | null;
}

/** One row, read for somebody who looks. @throws Error in words */
export async function readOnce(line: ModbusLine, row: Omit<Register, 'point'>): Promise<ReadOnce> {
  const words = await line.read(row.table, row.address, wordsOf(row.type));
  const raw = rawOf(row.type, row.wordOrder, words);
  const value = valueOf(row, words);
  const isNumber = Number.isFinite(value);
  return {
    words,
    raw: Number.isFinite(raw) ? raw : null,
    value: isNumber ? value : null,
    why: isNumber ? null : `${placeOf(row)} holds no number in this form: look at type and word order`,
  };
}
