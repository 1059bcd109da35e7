import { describe, expect, it } from 'vitest';
import { bodyOfRows, rowAfter, rowsOf, withTable } from '@/components/wiring/register-rows';
import { nodeGroups } from '@/components/wiring/forms/node';
import { bodyOf, valuesOf } from '@/components/wiring/spec';
import { KINDS } from '@/components/wiring/kinds';
import { Registers } from '@/lib/schema/bus';
import { NodeCreate } from '@/lib/schema/node';
import { USUAL } from '@/lib/units/preferences';

const registers = Registers.parse([
  {
    point: 'bench-1',
    table: 'holding',
    address: 4,
    type: 'f32',
    wordOrder: 'low-first',
    scale: 1e-7,
    unit: 'Cel',
  },
]);

describe('the register map as it is typed', () => {
  it('is sent as it was read, to the last digit', () => {
    expect(bodyOfRows(rowsOf(registers), USUAL)).toEqual({ body: registers, errors: {} });
  });

  it('keeps what cannot be read, and names its field', () => {
    const [row] = rowsOf(registers);
    const typed = row === undefined ? [] : [row, { ...row, id: 1, address: 'four', scale: '' }];
    const { errors } = bodyOfRows(typed, USUAL);
    expect(Object.keys(errors).sort()).toEqual(['registers.1.address', 'registers.1.scale']);
  });

  it.each(['0.5', '-1', '65536', '1e2', '', 'four'])(
    'tells of an address %o what an address is',
    (address) => {
      const [row] = rowsOf(registers);
      const { errors } = bodyOfRows(row === undefined ? [] : [{ ...row, address }], USUAL);
      expect(errors).toEqual({
        'registers.0.address': 'Give a whole number from 0 to 65535, as it is on the wire.',
      });
    },
  );

  it('takes the first and the last address that there is', () => {
    const [row] = rowsOf(registers);
    const typed = row === undefined ? [] : ['0', '65535'].map((address, id) => ({ ...row, id, address }));
    expect(bodyOfRows(typed, USUAL)).toMatchObject({
      body: [{ address: 0 }, { address: 65_535 }],
      errors: {},
    });
  });

  it('goes on behind a value of two registers, and turns a coil into a bit', () => {
    const next = rowAfter(rowsOf(registers));
    expect([next.address, next.point, next.id]).toEqual(['6', '', 1]);
    expect(withTable(next, 'coil')).toMatchObject({ type: 'bit', unit: '/', scale: '1' });
    expect(withTable({ ...next, type: 'bit' }, 'input').type).toBe('s16');
  });
});

describe('the form of a new node', () => {
  const groups = nodeGroups(null);
  const typed = (more: object) => {
    const first = valuesOf(groups, KINDS.node.first({} as never), USUAL);
    return bodyOf(groups, { ...first, key: 'N-9', ...more }, USUAL);
  };

  it('sends nothing of a bus for a node that calls by itself', () => {
    const { body, errors } = typed({ kind: 'socket' });
    expect([Object.keys(body).sort(), errors]).toEqual([['channels', 'key', 'kind', 'reportEvery'], {}]);
  });

  it('asks for a board’s address, and sends no watchdog where none is told', () => {
    expect(Object.keys(typed({ kind: 'modbus' }).errors)).toEqual(['modbus.host']);
    const at = { host: '192.0.2.10', port: '502', unit: '1', timeout: '2', firstCoil: '0' };
    const { body } = typed({
      kind: 'modbus',
      modbus: { ...at, watchdog: { address: '', value: '', within: '' } },
    });
    expect(NodeCreate.parse(body).modbus).toMatchObject({ host: '192.0.2.10', watchdog: null });
  });
});
