/** One connection to a board on Modbus TCP: one request at a time, each with its time-out, each failure with its words. */
import net from 'node:net';
import ModbusRTU from 'modbus-serial';
import type { ModbusBus, Register } from '@/lib/schema/bus';
import { connectionTrouble, exceptionWords } from '@/lib/wording/bus';

/** The board answered, by an exception: the line stands. */
export class BoardException extends Error {
  override readonly name = 'BoardException';
  constructor(readonly code: number) {
    super(exceptionWords(code));
  }
}

/** Requests without an answer, one after another, after which nobody is taken to be there. */
const UNANSWERED_MOST = 2;

export interface LineWatch {
  /** Something came. */
  heard: () => void;
  /** Runs once: the connection is gone, with the reason. */
  lost: (why: string) => void;
  /** Asked right before each write, however long that waited in the queue or the process stood still. */
  mayWrite: () => boolean;
}

export class ModbusLine {
  private tail: Promise<unknown> = Promise.resolve();
  private unanswered = 0;
  private gone: string | null = null;

  private constructor(
    private readonly socket: net.Socket,
    private readonly client: ModbusRTU,
    private readonly settings: ModbusBus,
    private readonly watch: LineWatch,
  ) {
    let why = 'it closed the connection';
    socket.on('error', (error) => (why = connectionTrouble(error)));
    socket.on('close', () => this.end(why));
  }

  /** @throws Error whose message says in words why not */
  static async open(settings: ModbusBus, watch: LineWatch): Promise<ModbusLine> {
    const socket = await dialled(settings);
    const client = new ModbusRTU();
    // the socket's own events tell of its end; without a listener this one would end the process
    client.on('error', () => undefined);
    client.setID(settings.unit);
    await client.linkTCP(socket, { port: settings.port });
    // after the linking, which would end a line that is quiet for so long
    client.setTimeout(settings.timeout * 1000);
    return new ModbusLine(socket, client, settings, watch);
  }

  /** Bits are 0 and 1. */
  read(table: Register['table'], address: number, count: number): Promise<number[]> {
    return this.ask(async () => {
      const { client } = this;
      switch (table) {
        case 'coil':
          return (await client.readCoils(address, count)).data.slice(0, count).map(Number);
        case 'discrete':
          return (await client.readDiscreteInputs(address, count)).data.slice(0, count).map(Number);
        case 'input':
          return (await client.readInputRegisters(address, count)).data;
        case 'holding':
          return (await client.readHoldingRegisters(address, count)).data;
      }
    });
  }

  async writeCoil(address: number, isOn: boolean): Promise<void> {
    await this.ask(() => this.client.writeCoil(address, isOn), true);
  }

  async writeRegister(address: number, value: number): Promise<void> {
    await this.ask(() => this.client.writeRegister(address, value), true);
  }

  close(): void {
    this.gone ??= 'this worker let it go';
    this.socket.destroy();
  }

  /** Boards answer one request after another; some drop a second one that comes meanwhile. */
  private ask<T>(request: () => Promise<T>, isWrite = false): Promise<T> {
    const asked = this.tail.then(() => this.once(request, isWrite));
    this.tail = asked.catch(() => undefined);
    return asked;
  }

  private async once<T>(request: () => Promise<T>, isWrite: boolean): Promise<T> {
    if (this.gone !== null) throw new Error(this.gone);
    if (isWrite && !this.watch.mayWrite()) throw new Error('this worker may not lead any more');
    try {
      const answer = await request();
      this.unanswered = 0;
      this.watch.heard();
      return answer;
    } catch (error) {
      throw this.told(error);
    }
  }

  private told(error: unknown): Error {
    if (error instanceof Error && 'modbusCode' in error && typeof error.modbusCode === 'number') {
      this.unanswered = 0;
      this.watch.heard();
      return new BoardException(error.modbusCode);
    }
    this.unanswered += 1;
    const why = isTimeout(error)
      ? `it does not answer within ${this.settings.timeout} s`
      : `it answers what is no Modbus (${error instanceof Error ? error.message : String(error)})`;
    if (this.unanswered >= UNANSWERED_MOST) this.end(why);
    return new Error(this.gone ?? why);
  }

  private end(why: string): void {
    this.socket.destroy();
    if (this.gone !== null) return;
    this.gone = why;
    this.watch.lost(why);
  }
}

/** The package's own error of this name is no Error. */
function isTimeout(error: unknown): boolean {
  return (
    typeof error === 'object' &&
    error !== null &&
    'name' in error &&
    error.name === 'TransactionTimedOutError'
  );
}

function dialled({ host, port, timeout }: ModbusBus): Promise<net.Socket> {
  return new Promise((resolve, reject) => {
    const socket = net.connect({ host, port, noDelay: true });
    const late = () => {
      socket.destroy();
      reject(new Error(`it does not answer within ${timeout} s`));
    };
    socket.setTimeout(timeout * 1000);
    socket.once('timeout', late);
    socket.once('error', (error) => reject(new Error(connectionTrouble(error))));
    socket.once('connect', () => {
      // each request has a time-out of its own; a line on which nothing is asked may be quiet
      socket.setTimeout(0);
      socket.removeListener('timeout', late);
      resolve(socket);
    });
  });
}
