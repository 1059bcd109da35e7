/**
 * The demo's past: the real core drives the yard's physics, and what it did is kept by the worker's own queries. Only the
 * clock and the wire are played; no figure is made up. The yard's process then goes on from the world that is saved here.
 */
import { v7 } from 'uuid';
import { everyHolding, everyPool } from '@/db/client';
import { createHeapEntry } from '@/db/queries/heap-entry';
import { releaseLead, takeLead } from '@/db/queries/leader';
import { createProbeSet } from '@/db/queries/probe-set';
import { loadHouse } from '@/db/queries/plan';
import { roundOf, type RoundDeed } from '@/db/seed/heap-rounds';
import type { HeapEffect } from '@/db/seed/winter';
import type { SeededHouse } from '@/db/seed/write-house';
import { HeapEntryCreate } from '@/lib/schema/heap';
import { sensorReadings } from '../yard/sensors';
import { saveWorld } from '../yard/store';
import { createWorld, feedHeap, stepWorld, turnHeap, type World, type YardRelays } from '../yard/world';
import { deedsUntil, silencesUntil, type Deed, type Silence } from './demo-history/deeds';
import { keepEnd } from './demo-history/end';
import { HouseRun } from './demo-history/house-run';
import { Kept } from './demo-history/kept';
import { actPerson, sayReady } from './demo-history/people';
import type { Place } from './demo-history/place';

export interface HistoryHolding {
  holdingId: string;
  houses: Pick<SeededHouse, 'houseId' | 'slug'>[];
}

export interface HistorySpan {
  /** Epoch ms of app time. */
  from: number;
  to: number;
  /** Of the yard's winter. */
  seed: number;
  stateFile: string;
}

/** The yard's nodes take readings at whole multiples of this. */
const SAMPLE_EVERY_MS = 30_000;
/** Some 25 000 readings: written while the next are made. */
const WRITE_EVERY_MS = 6 * 3_600_000;
/** So often the event loop gets its turn, or nothing would be written meanwhile. */
const PAUSE_EVERY_MS = 20 * 60_000;
const SAY_EVERY_MS = 7 * 86_400_000;

export async function playHistory(holdings: readonly HistoryHolding[], span: HistorySpan): Promise<void> {
  if (span.to <= span.from) return saveWorld(span.stateFile, createWorld(span.seed, span.to));
  const instance = v7();
  const lead = await takeLead(everyHolding(), instance);
  if (lead === null) throw new Error('a worker leads on this database: stop it first.');
  try {
    await new History(span, lead.epoch).play(holdings);
  } finally {
    // the next leader takes the epoch above, so that every number of ours is older than its own
    await releaseLead(everyHolding(), instance, lead.epoch);
  }
}

class History {
  private world: World;
  private coils: YardRelays = {};
  private readonly kept = new Kept(everyHolding(), everyPool());
  private readonly places = new Map<string, Place>();
  private silences: Silence[] = [];
  private writing: Promise<void> = Promise.resolve();

  constructor(
    private readonly span: HistorySpan,
    private readonly epoch: number,
  ) {
    this.world = createWorld(span.seed, span.from);
  }

  async play(holdings: readonly HistoryHolding[]): Promise<void> {
    const { from, to } = this.span;
    await this.load(holdings);
    const zoneOf = (house: string) => this.places.get(house)?.record.config.house.zone ?? 'utc';
    const deeds = deedsUntil(to, zoneOf).filter((one) => this.places.has(one.house));
    this.silences = silencesUntil(to, zoneOf);
    // a node sends what it reads as soon as it is welcome
    this.sample(from);
    for (const place of this.places.values()) await sayReady(place, from);

    let writeAt = from + WRITE_EVERY_MS;
    let sayAt = from + SAY_EVERY_MS;
    for (
      let sampleAt = (Math.floor(from / SAMPLE_EVERY_MS) + 1) * SAMPLE_EVERY_MS;
      sampleAt <= to;
      sampleAt += SAMPLE_EVERY_MS
    ) {
      for (let deed = deeds[0]; deed !== undefined && deed.at <= sampleAt; deed = deeds[0]) {
        deeds.shift();
        this.wakeUntil(deed.at);
        await this.act(deed);
      }
      this.wakeUntil(sampleAt);
      this.sample(sampleAt);
      if (sampleAt % PAUSE_EVERY_MS === 0) await breath();
      if (sampleAt >= writeAt) {
        writeAt += WRITE_EVERY_MS;
        await this.write();
      }
      if (sampleAt < sayAt) continue;
      sayAt += SAY_EVERY_MS;
      console.log(`History: ${Math.round((sampleAt - from) / 86_400_000)} nights played.`);
    }
    this.wakeUntil(to);
    await this.end();
  }

  private async load(holdings: readonly HistoryHolding[]): Promise<void> {
    for (const { holdingId, houses } of holdings) {
      const holding = { id: holdingId, db: everyHolding() };
      for (const { houseId, slug } of houses) {
        const record = await loadHouse(holding, houseId);
        if (record === null) throw new Error(`${slug} is not there.`);
        const run = new HouseRun(slug, record, this.epoch, this.span.from, this.kept, (node, coils, at) => {
          this.advance(at);
          this.coils = { ...this.coils, [node]: coils };
        });
        this.places.set(slug, { run, holding, record });
      }
    }
  }

  /** Lets every house step when it wants to, in order of time, up to but not at `until`. */
  private wakeUntil(until: number): void {
    for (;;) {
      let first: Place | null = null;
      for (const place of this.places.values())
        if (place.run.dueAt < (first?.run.dueAt ?? until)) first = place;
      if (first === null) return;
      first.run.stepAt(first.run.dueAt);
    }
  }

  private sample(at: number): void {
    this.advance(at);
    const t = Math.floor(at / 1000);
    for (const { run } of this.places.values()) {
      const silent = this.silences.filter(
        ({ house, from, to }) => house === run.slug && from <= at && at < to,
      );
      const pack = sensorReadings(this.world, run.slug, t * 1000)
        .filter(({ key }) => !silent.some(({ point }) => point === key))
        .map(({ key: n, unit: u, value: v }) => ({ n, u, v, t }));
      run.take(pack, at);
    }
  }

  private advance(at: number): void {
    if (at > this.world.ms) this.world = stepWorld(this.world, this.coils, (at - this.world.ms) / 1000);
  }

  private async act({ at, house, ...deed }: Deed): Promise<void> {
    const place = this.places.get(house);
    if (place === undefined) return;
    if (deed.what === 'person')
      return at < this.span.from ? undefined : actPerson(place, this.kept, deed.deed, at);
    if (deed.what === 'round') return this.actRound(place, deed.deed, at);
    const { entry, by, effect } = deed.deed;
    const given = HeapEntryCreate.parse({ ...entry, at: new Date(at).toISOString() });
    // what was built before the controller came was written down when it came
    const now = new Date(Math.max(at, this.span.from));
    await createHeapEntry(place.holding, place.record.id, given, { by, now });
    if (effect === undefined || at < this.span.from) return;
    this.advance(at);
    this.world = changed(this.world, house, effect);
  }

  /** A round reads what the yard's physics has just then; before the history there is none to read. */
  private async actRound({ run, holding, record }: Place, deed: RoundDeed, at: number): Promise<void> {
    if (at < this.span.from) return;
    this.advance(at);
    const read = sensorReadings(this.world, run.slug, Math.floor(at / 1000) * 1000);
    const valueOf = (key: string) => read.find((one) => one.key === key)?.value;
    const [core, outdoors] = [valueOf(deed.corePoint), valueOf('outdoors')];
    if (core === undefined || outdoors === undefined) return;
    const given = roundOf(deed, { core, outdoors }, new Date(at));
    await createProbeSet(holding, record.id, given, { by: deed.by, now: new Date(at) });
  }

  /** Begins to write once what was begun before is written. */
  private async write(): Promise<void> {
    await this.writing;
    this.writing = this.kept.write();
    // awaited at the next write; a failure must wait until then without ending the process
    this.writing.catch(() => undefined);
  }

  /** The last step is at the very end, so that whoever drives on finds how things stood then. */
  private async end(): Promise<void> {
    const { from, to, stateFile } = this.span;
    this.advance(to);
    const places = [...this.places.values()];
    for (const { run } of places) run.stepAt(to);
    await this.write();
    await this.writing;
    await keepEnd(places, from, to);
    saveWorld(stateFile, this.world);
    const { readings, switchings, alarms } = this.kept.counts;
    console.log(`History kept. Readings: ${readings}. Switchings: ${switchings}. Alarms: ${alarms}.`);
  }
}

function breath(): Promise<void> {
  return new Promise((resolve) => {
    setImmediate(resolve);
  });
}

function changed(world: World, house: string, effect: HeapEffect): World {
  return effect.kind === 'turn' ? turnHeap(world, house) : feedHeap(world, house, effect);
}
