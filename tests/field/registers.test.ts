import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { blocksOf, rawOf, valueOf, wordsOf } from '@/lib/field/registers';
import { REGISTER_TYPES, Register, Registers, WORD_ORDERS } from '@/lib/schema/bus';

const words = (bytes: Buffer): number[] =>
  Array.from({ length: bytes.length / 2 }, (_, at) => bytes.readUInt16BE(at * 2));

describe('a value is what a board meant', () => {
  it.each([
    ['u16', [0xffff], 65_535],
    ['s16', [0xffff], -1],
    ['s16', [0x8000], -32_768],
    ['u32', [0x0001, 0x0000], 65_536],
    ['s32', [0xffff, 0xfffe], -2],
    // IEEE 754: 123456.0 is 47F12000
    ['f32', [0x47f1, 0x2000], 123_456],
    ['bit', [1], 1],
  ] as const)('%s %j is %d', (type, given, value) => {
    expect(rawOf(type, 'high-first', given)).toBe(value);
    expect(rawOf(type, 'low-first', [...given].reverse())).toBe(value);
  });

  it('any number that fits comes back, in either word order (Node’s own writing of it)', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -(2 ** 31), max: 2 ** 31 - 1 }),
        fc.constantFrom(...WORD_ORDERS),
        (number, order) => {
          const bytes = Buffer.alloc(4);
          bytes.writeInt32BE(number);
          const given = order === 'high-first' ? words(bytes) : words(bytes).reverse();
          expect(rawOf('s32', order, given)).toBe(number);
          expect(rawOf('u32', order, given)).toBe(number < 0 ? number + 2 ** 32 : number);
        },
      ),
    );
    fc.assert(
      fc.property(fc.float({ noNaN: true }), fc.constantFrom(...WORD_ORDERS), (number, order) => {
        const bytes = Buffer.alloc(4);
        bytes.writeFloatBE(number);
        const given = order === 'high-first' ? words(bytes) : words(bytes).reverse();
        expect(rawOf('f32', order, given)).toBe(number);
      }),
    );
  });

  it('is scaled without the noise of binary fractions', () => {
    const row = { type: 's16', wordOrder: 'high-first', scale: 0.1, offset: 0 } as const;
    expect(valueOf(row, [234])).toBe(23.4);
    expect(valueOf({ ...row, scale: 0.01, offset: -40 }, [6340])).toBe(23.4);
  });
});

const anyRow = fc
  .record({
    table: fc.constantFrom('coil', 'discrete', 'input', 'holding' as const),
    address: fc.integer({ min: 0, max: 65_534 }),
    number: fc.constantFrom(...REGISTER_TYPES.filter((type) => type !== 'bit')),
  })
  .map(({ table, address, number }) => ({
    ...{ table, address },
    type: table === 'coil' || table === 'discrete' ? ('bit' as const) : number,
  }));

describe('blocks', () => {
  it('hold every row once, at its own place, and no address that nobody asked for', () => {
    fc.assert(
      fc.property(fc.array(anyRow, { maxLength: 60 }), (rows) => {
        const blocks = blocksOf(rows);
        const found = blocks.flatMap(({ rows: held }) => held.map(({ row }) => row));
        expect(found).toHaveLength(rows.length);
        for (const { table, address, count, rows: held } of blocks) {
          expect(count).toBeLessThanOrEqual(table === 'input' || table === 'holding' ? 125 : 2000);
          const asked = new Set(
            held.flatMap(({ row, at }) => {
              expect([row.table, address + at]).toEqual([table, row.address]);
              return Array.from({ length: wordsOf(row.type) }, (_, one) => row.address + one);
            }),
          );
          expect(asked.size).toBe(count);
        }
      }),
    );
  });
});

describe('a row is refused at its field', () => {
  const row = { point: 'bench-1', table: 'input', address: 0, type: 's16', unit: 'Cel' };
  it.each([
    [{ point: '=1+1' }, 'point'],
    [{ point: '<script>' }, 'point'],
    [{ table: 'eeprom' }, 'table'],
    [{ address: 65_536 }, 'address'],
    [{ address: -1 }, 'address'],
    [{ address: 1.5 }, 'address'],
    [{ address: 65_535, type: 'f32' }, 'address'],
    [{ type: 'bit' }, 'type'],
    [{ table: 'coil' }, 'type'],
    [{ scale: 0 }, 'scale'],
    [{ scale: Infinity }, 'scale'],
    [{ offset: NaN }, 'offset'],
    [{ unit: 'furlong' }, 'unit'],
    [{ wordOrder: 'sideways' }, 'wordOrder'],
  ])('%j', (wrong, path) => {
    const parsed = Register.safeParse({ ...row, ...wrong });
    expect(parsed.error?.issues.map((issue) => issue.path.join('.'))).toContain(path);
  });

  it('and a point that has a row already is refused at the later one', () => {
    const parsed = Registers.safeParse([row, { ...row, address: 7 }]);
    expect(parsed.error?.issues.map((issue) => issue.path.join('.'))).toEqual(['1.point']);
  });
});
