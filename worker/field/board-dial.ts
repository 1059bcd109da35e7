/** Reaches a board on Modbus TCP, again and again until it is there. */
import type { ModbusBus } from '@/lib/schema/bus';
import type { Cancel } from '../clock';
import { BackOff } from './back-off';
import type { BusDeps, BusNode } from './bus';
import { ModbusLine } from './modbus-line';

interface Reached {
  /** What must go well on the line before the board is taken as there. */
  first: (line: ModbusLine) => Promise<unknown>;
  up: (line: ModbusLine) => void;
  lost: (why: string) => void;
}

export class BoardDial {
  /** Why there is no link. */
  why = 'it has not been reached yet';
  private stopped = false;
  private cancel: Cancel = () => undefined;
  private readonly backOff = new BackOff();

  constructor(
    private readonly node: BusNode,
    private readonly settings: ModbusBus,
    private readonly deps: BusDeps,
    private readonly on: Reached,
  ) {}

  async dial(): Promise<void> {
    if (this.stopped) return;
    try {
      const line = await ModbusLine.open(this.settings, {
        heard: () => this.node.house.nodes.heard(this.node.nodeId),
        lost: this.on.lost,
        mayWrite: this.deps.mayDrive,
      });
      await this.on.first(line).catch((error: unknown) => {
        line.close();
        throw error;
      });
      this.reached(line);
    } catch (error) {
      this.again(errorWords(error));
    }
  }

  private reached(line: ModbusLine): void {
    if (this.stopped) return line.close();
    this.backOff.reset();
    this.on.up(line);
  }

  again(why: string): void {
    if (this.stopped) return;
    this.why = why;
    const waitMs = this.backOff.next();
    this.node.house.nodes.tellLink(this.node.nodeId, why);
    this.deps.log.info({ node: this.node.nodeId, why, waitMs: Math.round(waitMs) }, 'a board is not there');
    this.cancel = this.deps.clock.after(waitMs, () => void this.dial());
  }

  stop(): void {
    this.stopped = true;
    this.cancel();
  }
}

export function errorWords(error: unknown): string {
  return error instanceof Error ? error.message : String(error);
}
