// The bytes on the wire, against the specification's worked examples: a plain socket answers, which knows no library.
import { once } from 'node:events';
import net from 'node:net';
import { afterEach, describe, expect, it } from 'vitest';
import { BoardException, ModbusLine } from '@/worker/field/modbus-line';
import { EXCEPTION, READS, UNIT, WRITE_COIL, WRITE_REGISTER } from '../checks/modbus';
import { until } from '../support/until';

const bytesOf = (hex: string) => Buffer.from(hex.replaceAll(' ', ''), 'hex');
let servers: net.Server[] = [];
let lines: ModbusLine[] = [];
afterEach(() => {
  for (const line of lines) line.close();
  for (const server of servers) server.close();
  [servers, lines] = [[], []];
});

/** @param answer bytes after the header, the very bytes to send, or null for silence */
async function opened(
  answer: (request: string) => Buffer | null,
  lost: (why: string) => void = () => undefined,
  came: (socket: net.Socket) => void = () => undefined,
) {
  const requests: { header: Buffer; body: string }[] = [];
  let isCome = false;
  const server = net.createServer((socket) => {
    isCome = true;
    came(socket);
    socket.on('error', () => undefined);
    socket.on('data', (data) => {
      const body = data
        .subarray(6)
        .toString('hex')
        .toUpperCase()
        .replace(/..(?=.)/g, '$& ');
      requests.push({ header: data.subarray(0, 6), body });
      const told = answer(body);
      if (told === null) return;
      const header = Buffer.from(data.subarray(0, 6));
      header.writeUInt16BE(told.length, 4);
      socket.write(Buffer.concat([header, told]));
    });
  });
  servers.push(server);
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as net.AddressInfo;
  const settings = { host: '127.0.0.1', port, unit: UNIT, timeout: 1, firstCoil: 0, watchdog: null };
  const line = await ModbusLine.open(settings, { heard: () => undefined, mayWrite: () => true, lost });
  lines.push(line);
  await until('the board has taken it', () => isCome);
  return { line, requests, server };
}

describe('reading', () => {
  it.each(READS)('section $section: $what', async ({ table, address, count, request, answer, values }) => {
    const { line, requests } = await opened(() => bytesOf(answer));
    expect(await line.read(table, address, count)).toEqual(values);
    expect(requests.map(({ body }) => body)).toEqual([request]);
  });
});

it('a coil is written as FF00 and 0000, a register as its value', async () => {
  const { line, requests } = await opened((request) => bytesOf(request));
  await line.writeCoil(WRITE_COIL.address, true);
  await line.writeCoil(WRITE_COIL.address, false);
  await line.writeRegister(WRITE_REGISTER.address, WRITE_REGISTER.value);
  expect(requests.map(({ body }) => body)).toEqual([WRITE_COIL.on, WRITE_COIL.off, WRITE_REGISTER.bytes]);
});

it('a header holds protocol 0 and the bytes that follow it', async () => {
  const { line, requests } = await opened((request) => bytesOf(request));
  await line.writeCoil(172, true);
  expect(requests[0]?.header.subarray(2).toString('hex')).toBe('00000006');
});

it('an exception is told in words, and the line stands', async () => {
  const { line, requests } = await opened(() => bytesOf(EXCEPTION.answer));
  const refused = await line.read('coil', EXCEPTION.address, 1).catch((error: unknown) => error);
  expect(refused).toBeInstanceOf(BoardException);
  expect((refused as BoardException).message).toBe('it has nothing at this address (exception 2)');
  expect(requests[0]?.body).toBe(EXCEPTION.request);
  await expect(line.read('coil', EXCEPTION.address, 1)).rejects.toBeInstanceOf(BoardException);
});

describe('a line that is not well', () => {
  it('ends after two requests without an answer, in words', async () => {
    const lost: string[] = [];
    const { line } = await opened(
      () => null,
      (why) => lost.push(why),
    );
    await expect(line.read('coil', 0, 1)).rejects.toThrow('it does not answer within 1 s');
    await expect(line.read('coil', 0, 1)).rejects.toThrow('it does not answer within 1 s');
    expect(lost).toEqual(['it does not answer within 1 s']);
  });

  it('ends once it answers for another unit, or with another length', async () => {
    const lost: string[] = [];
    const { line } = await opened(
      () => bytesOf('12 03 02 00 01'),
      (why) => lost.push(why),
    );
    await expect(line.read('holding', 0, 1)).rejects.toThrow(/no Modbus/);
    await expect(line.read('holding', 0, 2)).rejects.toThrow(/no Modbus/);
    expect(lost).toHaveLength(1);
  });

  it('that the board closes is told once', async () => {
    const lost: string[] = [];
    let socket: net.Socket | undefined;
    const { server } = await opened(
      () => null,
      (why) => lost.push(why),
      (one) => (socket = one),
    );
    socket?.destroy();
    await until('it is told', () => lost.length > 0);
    expect([lost, server.listening]).toEqual([['it closed the connection'], true]);
  });

  it('to where nothing listens is not opened, in words', async () => {
    const settings = { host: '127.0.0.1', port: 1, unit: 1, timeout: 1, firstCoil: 0, watchdog: null };
    const watch = { heard: () => undefined, mayWrite: () => true, lost: () => undefined };
    await expect(ModbusLine.open(settings, watch)).rejects.toThrow('nothing listens there');
  });
});
