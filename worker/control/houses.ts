/** Every house that this worker leads: loaded at the start, looked at again when told and each 30 s. */
import { listHouses, loadHouseInService, type HouseHead } from '@/db/queries/plan';
import { commandsAfter, housesWithCommands } from '@/db/queries/waiting-command';
import { correct, latestReadings } from '@/db/queries/reading';
import { readMemory, writeNodeStatus } from '@/db/queries/running';
import { leaseS } from '@/lib/field/frames';
import { migrateMemory } from '@/lib/control/memory-versions';
import { controlFailed } from '../alarms/wanted';
import type { Base } from '../base';
import type { Cancel } from '../clock';
import { OnceMore } from '../once-more';
import { House } from './house';
import type { HouseDeps } from './house-deps';
import type { Seen } from './seen-points';

/** One in case a notification was missed: level, not edge. */
const LOOK_EVERY_MS = 30_000;
const NOTES_EVERY_MS = 10_000;
const LOADING_AT_ONCE = 8;
/** A leader beats each 2 s, so this long after its last beat it may still have answered a node. */
const BEAT_SLACK_MS = 2500;

export class Houses {
  private readonly houses = new Map<string, House>();
  private readonly loading = new Map<string, OnceMore>();
  /** A thousand new houses are told one by one: each look takes up all that there are. */
  private readonly looking = new OnceMore(() => this.lookOnce());
  private cancels: Cancel[] = [];
  private startedAt = 0;
  private formerLeaseEnd: number | null = null;
  private leading = false;

  constructor(
    private readonly base: Base,
    private readonly deps: Omit<HouseDeps, keyof Base | 'startedAt'>,
  ) {}

  all(): House[] {
    return [...this.houses.values()];
  }

  get(houseId: string): House | undefined {
    return this.houses.get(houseId);
  }

  /** App time of the newest step of any house. */
  lastStepAt(): number | null {
    const times = this.all().flatMap((house) => house.lastStepAt ?? []);
    return times.length === 0 ? null : Math.max(...times);
  }

  /** Takes every house up where its memory stands. */
  async lead(formerHeartbeatAt: number | null): Promise<void> {
    const { clock } = this.base;
    this.leading = true;
    this.startedAt = clock.appNow();
    this.formerLeaseEnd =
      formerHeartbeatAt === null
        ? null
        : Math.min(this.startedAt, clock.appAt(formerHeartbeatAt + BEAT_SLACK_MS)) + leaseS * 1000;
    await this.look();
    this.cancels = [
      clock.every(LOOK_EVERY_MS, () => void this.look().catch((error: unknown) => this.complain(error))),
      clock.every(
        NOTES_EVERY_MS,
        () => void this.keepNotes().catch((error: unknown) => this.complain(error)),
      ),
    ];
  }

  /** Stops commanding; nothing is switched, the leases decide. */
  stop(keepMemory: boolean): void {
    this.leading = false;
    for (const cancel of this.cancels) cancel();
    this.cancels = [];
    for (const house of this.all()) {
      if (keepMemory) house.keepMemory();
      house.nodes.closeLinks(1012, 'this worker stops');
      house.stop();
    }
    this.houses.clear();
  }

  /** The house as the database has it now, for one whose notification may still be on its way. */
  async refresh(holdingId: string, houseId: string): Promise<House | undefined> {
    await this.reload(holdingId, houseId);
    return this.houses.get(houseId);
  }

  /** All houses: new ones are taken up, changed ones looked at again, removed ones let go; waiting commands are taken. */
  look(): Promise<void> {
    return this.looking.run();
  }

  private async lookOnce(): Promise<void> {
    const heads = await listHouses(this.base.db);
    const present = new Set(heads.map((head) => head.id));
    for (const house of this.all()) if (!present.has(house.id)) this.drop(house);
    const stale = heads.filter((head) => this.houses.get(head.id)?.record.planRevision !== head.planRevision);
    await this.loadAll(stale);
    for (const houseId of await housesWithCommands(this.base.db)) await this.takeCommands(houseId);
  }

  async planChanged(houseId: string): Promise<void> {
    const known = this.houses.get(houseId);
    if (known !== undefined) return this.reload(known.holdingId, houseId);
    return this.look();
  }

  async takeCommands(houseId: string): Promise<void> {
    const house = this.houses.get(houseId);
    if (house === undefined) return;
    const holding = { id: house.holdingId, db: this.base.db };
    house.order(await commandsAfter(holding, houseId, house.taken));
  }

  private async loadAll(heads: readonly HouseHead[]): Promise<void> {
    const rest = [...heads];
    const next = async (): Promise<void> => {
      for (let head = rest.pop(); head !== undefined; head = rest.pop()) {
        await this.reload(head.holdingId, head.id);
      }
    };
    await Promise.all(Array.from({ length: LOADING_AT_ONCE }, next));
  }

  /** One after the other for a house, so that an older record never lands on a newer one. */
  private async reload(holdingId: string, houseId: string): Promise<void> {
    const work = this.loading.get(houseId) ?? new OnceMore(() => this.loadOrTell(holdingId, houseId));
    this.loading.set(houseId, work);
    await work.run();
    if (work.idle) this.loading.delete(houseId);
  }

  private async loadOrTell(holdingId: string, houseId: string): Promise<void> {
    try {
      await this.load(holdingId, houseId);
    } catch (error) {
      this.failedToLoad(holdingId, houseId, error);
    }
  }

  private async load(holdingId: string, houseId: string): Promise<void> {
    const holding = { id: holdingId, db: this.base.db };
    const record = await loadHouseInService(holding, houseId);
    const known = this.houses.get(houseId);
    if (record === null) return known === undefined ? undefined : this.drop(known);
    if (known !== undefined) return known.replan(record);
    const kept = await readMemory(holding, houseId);
    const memory = migrateMemory(kept?.memory);
    const points = new Map(record.points.map((point) => [point.id, point]));
    const latest = (await latestReadings(holding, houseId)).map(({ pointId, at, value }): Seen => ({
      ...{ pointId, at, raw: value },
      value: correct(points.get(pointId)?.calibrations ?? [], at, value),
    }));
    const commands = await commandsAfter(holding, houseId, memory.taken);
    if (!this.leading) return;
    const deps = { ...this.base, ...this.deps, startedAt: this.startedAt };
    const house = new House(record, memory, latest, this.formerLeaseEnd, deps);
    this.houses.set(houseId, house);
    // what people ordered meanwhile counts from its first step on: it starts nothing that somebody has stopped
    house.order(commands);
    house.step();
  }

  private drop(house: House): void {
    this.houses.delete(house.id);
    house.nodes.closeLinks(1008, 'this house was taken out of use');
    house.stop();
  }

  private failedToLoad(holdingId: string, houseId: string, error: unknown): void {
    this.base.log.error({ err: error, house: houseId }, 'this house cannot be loaded');
    if (this.houses.has(houseId)) return;
    const why = error instanceof Error ? error.message : String(error);
    this.deps.alarms.want(holdingId, houseId, controlFailed(houseId, why, this.base.clock.appNow()));
  }

  private async keepNotes(): Promise<void> {
    const notes = this.all().flatMap((house) => house.nodes.takeNotes());
    if (notes.length > 0) await writeNodeStatus(this.base.db, notes);
  }

  private complain(error: unknown): void {
    this.base.log.warn({ err: error }, 'the houses cannot be looked at; tried again');
  }
}
