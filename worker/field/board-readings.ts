/** What is read of a board on Modbus, and what of it was not taken. */
import type { RefusedRecord } from '@/lib/field/frames';
import { wiringOf, type BusDeps, type BusNode } from './bus';
import { takePack } from './intake';
import type { ModbusLine } from './modbus-line';
import { poll } from './modbus-poll';
import { tailOf } from './tail';

export class BoardReadings {
  constructor(
    private readonly node: BusNode,
    private readonly deps: BusDeps,
  ) {}

  async poll(line: ModbusLine): Promise<void> {
    const wiring = wiringOf(this.node);
    const { house } = this.node;
    if (wiring === undefined || wiring.registers.length === 0) return;
    try {
      const { pack, refused } = await poll(line, wiring.registers, () => this.deps.clock.appNow() / 1000);
      this.tellNotTaken(refused);
      // seen by control at once; what follows is the disk's business
      takePack(this.deps, this.deps.ingest, house, wiring, pack).catch((error: unknown) =>
        this.deps.log.warn({ err: error, node: wiring.key }, 'readings of a board could not be stored'),
      );
    } catch (error) {
      this.deps.log.info({ err: error, node: wiring.key }, 'a board could not be read');
    }
  }

  /** Coils that the board refused stand in the same list as readings, for whoever looks why. */
  tellRefused(refused: readonly { relay: number; why: string }[]): void {
    this.tellNotTaken(refused.map(({ relay, why }) => ({ index: 0, name: `relay ${relay}`, why })));
  }

  private tellNotTaken(refused: readonly RefusedRecord[]): void {
    if (refused.length === 0) return;
    this.node.house.nodes.tookPack(this.node.nodeId, { pack: [], taken: 0, refused }, () =>
      tailOf([], refused, new Map(), []),
    );
  }
}
