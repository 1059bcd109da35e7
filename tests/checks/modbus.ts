// SOURCE: Modbus Application Protocol Specification V1.1b3, worked examples of 6.1 to 6.6 and section 7; from memory.
// Bytes of unit, function and data as they follow the transaction and protocol identifiers and the length on TCP.
export const UNIT = 0x11;

export interface Exchange {
  section: string;
  what: string;
  request: string;
  answer: string;
}

export const READS: (Exchange & {
  table: 'coil' | 'discrete' | 'input' | 'holding';
  address: number;
  count: number;
  values: number[];
})[] = [
  {
    ...{ section: '6.1', what: 'coils 20 to 38', table: 'coil', address: 19, count: 19 },
    request: '11 01 00 13 00 13',
    answer: '11 01 03 CD 6B 05',
    values: [1, 0, 1, 1, 0, 0, 1, 1, 1, 1, 0, 1, 0, 1, 1, 0, 1, 0, 1],
  },
  {
    ...{ section: '6.2', what: 'discrete inputs 197 to 218', table: 'discrete', address: 196, count: 22 },
    request: '11 02 00 C4 00 16',
    answer: '11 02 03 AC DB 35',
    values: [0, 0, 1, 1, 0, 1, 0, 1, 1, 1, 0, 1, 1, 0, 1, 1, 1, 0, 1, 0, 1, 1],
  },
  {
    ...{ section: '6.3', what: 'holding registers 108 to 110', table: 'holding', address: 107, count: 3 },
    request: '11 03 00 6B 00 03',
    answer: '11 03 06 02 2B 00 00 00 64',
    values: [555, 0, 100],
  },
  {
    ...{ section: '6.4', what: 'input register 9', table: 'input', address: 8, count: 1 },
    request: '11 04 00 08 00 01',
    answer: '11 04 02 00 0A',
    values: [10],
  },
];

export const WRITE_COIL = { section: '6.5', address: 172, on: '11 05 00 AC FF 00', off: '11 05 00 AC 00 00' };
export const WRITE_REGISTER = { section: '6.6', address: 1, value: 3, bytes: '11 06 00 01 00 03' };
export const EXCEPTION = {
  section: '7',
  address: 0x04a1,
  request: '11 01 04 A1 00 01',
  answer: '11 81 02',
  code: 2,
};
