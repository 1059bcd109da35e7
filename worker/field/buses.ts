/** The ways to nodes that the leading worker goes to itself: one a node on a bus, begun and ended as the plan has it. */
import { answerTestRead, waitingTestReads, type AskedRead } from '@/db/queries/test-read';
import type { NodeWiring } from '@/db/queries/plan';
import { mayReach, notOnList } from '@/lib/server/bus-hosts';
import { unseal } from '@/lib/server/seal';
import type { Cancel } from '../clock';
import type { House } from '../control/house';
import type { Houses } from '../control/houses';
import { OnceMore } from '../once-more';
import type { Bus, BusDeps } from './bus';
import { ModbusNode } from './modbus-node';
import { MqttNode } from './mqtt-node';

/** One in case a notification was missed: level, not edge. */
const LOOK_EVERY_MS = 5000;

interface Running {
  house: House;
  /** What it was begun with; another begins it anew. */
  settings: string;
  bus: Bus;
}

export class Buses {
  private readonly running = new Map<string, Running>();
  private isOn = false;
  private cancelLook: Cancel = () => undefined;
  private readonly answering = new OnceMore(() => this.answerOnce());

  constructor(
    private readonly deps: BusDeps,
    private readonly houses: Houses,
  ) {}

  /** Nodes that are reached now. */
  get online(): number {
    return [...this.running.values()].filter(({ bus }) => bus.isUp).length;
  }

  /** Only who leads speaks to a bus. */
  start(): void {
    this.isOn = true;
    this.cancelLook = this.deps.clock.every(LOOK_EVERY_MS, () => this.look());
    this.look();
  }

  async stop(isEnd: boolean): Promise<void> {
    this.isOn = false;
    this.cancelLook();
    const all = [...this.running.values()];
    this.running.clear();
    await Promise.all(all.map(({ bus }) => bus.stop(isEnd)));
  }

  /** Begins what is wired, ends what is not any more. */
  look(): void {
    if (!this.isOn) return;
    const wired = new Map<string, { house: House; node: NodeWiring }>();
    for (const house of this.houses.all()) {
      for (const node of house.record.nodes) {
        const isTold = node.modbus !== null || node.mqtt !== null;
        if (isTold && node.tokens.length > 0) wired.set(node.id, { house, node });
      }
    }
    for (const [id, { house, settings, bus }] of this.running) {
      const now = wired.get(id);
      if (now?.house === house && settingsOf(now.node) === settings) continue;
      this.running.delete(id);
      // out of the plan, or told anew: what it drove is not driven any more
      void bus.stop(true);
    }
    for (const [id, { house, node }] of wired) if (!this.running.has(id)) this.begin(house, node);
  }

  /** Answers what people at panels have asked for. */
  answer(): Promise<void> {
    return this.isOn ? this.answering.run() : Promise.resolve();
  }

  private begin(house: House, node: NodeWiring): void {
    const at = { house, nodeId: node.id };
    const where = node.modbus ?? node.mqtt;
    if (where === null) return;
    if (!mayReach(where)) return house.nodes.tellLink(node.id, notOnList(where));
    const settings = settingsOf(node);
    if (node.modbus !== null)
      this.running.set(node.id, { house, settings, bus: new ModbusNode(at, node.modbus, this.deps) });
    else if (node.mqtt !== null) {
      const password = opened(node.busSecret);
      if (password === undefined)
        return house.nodes.tellLink(node.id, 'its password cannot be opened any more: type it again');
      this.running.set(node.id, {
        house,
        settings,
        bus: new MqttNode(at, { ...node.mqtt, password }, this.deps),
      });
    }
  }

  private async answerOnce(): Promise<void> {
    const asked = await waitingTestReads(this.deps.db);
    // boards side by side: one that does not answer holds up nobody else's
    await Promise.all(asked.map((one) => this.answerOne(one)));
  }

  private async answerOne(asked: AskedRead): Promise<void> {
    const bus = this.running.get(asked.nodeId)?.bus;
    const nothing = { words: null, raw: null, value: null };
    const failed = (why: string) => ({ ...nothing, why });
    const answer =
      bus instanceof ModbusNode
        ? await bus
            .readOnce(asked.ask)
            .catch((error: unknown) => failed(error instanceof Error ? error.message : String(error)))
        : failed('This board is not connected to: look at its node.');
    await answerTestRead(this.deps.db, asked, answer);
  }
}

/** What a bus is begun with. How often is read and which rows are looked up as they are then. */
function settingsOf({ modbus, mqtt, busSecret, channels, reportEveryS }: NodeWiring): string {
  return JSON.stringify({ modbus, mqtt, busSecret, channels, reportEveryS });
}

/** @returns undefined where it was sealed under another secret */
function opened(sealed: string | null): string | null | undefined {
  if (sealed === null) return null;
  try {
    const password = unseal(sealed, 'brokers');
    return typeof password === 'string' ? password : undefined;
  } catch {
    return undefined;
  }
}
