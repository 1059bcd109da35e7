// A long house with a fan to prove, and what the worker would have kept of it.
import { everyHolding, type Holding } from '@/db/client';
import { writeRunning } from '@/db/queries/running';
import { newChannel } from '@/lib/control/fit';
import { emptyMemory } from '@/lib/control/memory';
import { v7 as uuid } from 'uuid';
import { type Asker, itemsOf, type Json, newHolding, personOf, type Told } from './asker';
import { AT, makeLongHouse } from './long-house';
import { picture } from './picture';
import * as shown from './shown';

export interface ProofScene {
  holding: Holding;
  houseId: string;
  owner: Asker;
  grower: Asker;
  installer: Asker;
  /** Makes a channel and tells that its node is heard and its load stands. @returns its id */
  channel: (more: object) => Promise<string>;
  /** What is kept of the last step: is the node heard, does the load run. */
  stands: (more?: {
    online?: boolean;
    counted?: 'on' | 'off';
    claim?: string;
    taken?: number;
  }) => Promise<void>;
  /** The relay reported this of the load, so many ms after now. */
  reports: (channelId: string, state: 'on' | 'off', afterMs?: number) => Promise<void>;
}

export async function proofScene(): Promise<ProofScene> {
  const holding = await newHolding('larkmoor');
  const owner = await personOf(holding, 'owner', 'owner@larkmoor.example');
  const grower = await personOf(holding, 'grower', 'grower@larkmoor.example');
  const installer = await personOf(holding, 'installer', 'installer@larkmoor.example');
  const houseId = await makeLongHouse(owner);
  await owner.ask('PATCH', `${AT}/nodes/LH-1`, { channels: 64 });
  const made: { id: string; key: string }[] = [];
  const stands: ProofScene['stands'] = async ({
    online = true,
    counted = 'off',
    claim = 'idle',
    taken = 0,
  } = {}) => {
    const at = new Date();
    const memory = {
      ...emptyMemory(),
      channels: made.map(({ id }) => ({ ...newChannel(id, 'off'), counted })),
    };
    const state = {
      ...{ at: at.toISOString(), points: [], sources: [] },
      channels: made.map(({ key }) => ({ key, claim })),
      nodes: [{ key: 'LH-1', online, lastHeardAt: at.toISOString() }],
    };
    const row = {
      holdingId: holding.id,
      houseId,
      memory: { ...memory },
      memoryAt: at,
      taken,
      state,
      stateAt: at,
    };
    await writeRunning(everyHolding(), { switchings: [], decisions: [], reports: [], memories: [row] });
  };
  return {
    ...{ holding, houseId, owner, grower, installer, stands },
    channel: async (more) => {
      const channel: Json = await owner.make(`${AT}/channels`, { ...shown.fan, ...more });
      made.push({ id: String(channel['id']), key: String(channel['key']) });
      await stands();
      return String(channel['id']);
    },
    reports: async (channelId, state, afterMs = 0) => {
      const at = new Date(Date.now() + afterMs);
      const row = { holdingId: holding.id, id: uuid(), channelId, at, state, number: 1 };
      await writeRunning(everyHolding(), { switchings: [], decisions: [], reports: [row], memories: [] });
    },
  };
}

export const PROOFS = `${AT}/proofs`;

/** A proof of one channel, as somebody goes through it. */
export class Going {
  private constructor(
    private readonly who: Asker,
    readonly path: string,
  ) {}

  static async begin(who: Asker, channel: string): Promise<Going> {
    const told = await who.ask('POST', PROOFS, { channel });
    if (told.status !== 201) throw new Error(`the proof was answered ${told.status}: ${told.text}`);
    return new Going(who, `${PROOFS}/${String(told.body['id'])}`);
  }

  take(step: string, more: object = {}): Promise<Told> {
    return this.who.ask('POST', `${this.path}/steps`, { step, ...more });
  }

  run(kind: string, seconds?: number): Promise<Told> {
    return this.who.ask('POST', `${this.path}/runs`, { kind, ...(seconds === undefined ? {} : { seconds }) });
  }

  stop(): Promise<Told> {
    return this.who.ask('DELETE', `${this.path}/runs`);
  }

  async photograph(shows: string): Promise<Json> {
    return this.who.make(`${this.path}/photographs?shows=${shows}`, await picture());
  }

  /** Up to where the load may run. */
  async untilClear(): Promise<void> {
    await this.mustTake('dead', { testerBefore: true, circuitDead: true, testerAfter: true });
    await this.mustTake('rating');
    await this.photograph('plate');
    await this.photograph('wiring');
    await this.mustTake('photographs');
    await this.mustTake('clear', { peopleClear: true, isolatorOn: true });
  }

  async mustTake(step: string, more: object = {}): Promise<void> {
    const told = await this.take(step, more);
    if (told.status !== 200) throw new Error(`${step} was answered ${told.status}: ${told.text}`);
  }

  async states(): Promise<Record<string, unknown>> {
    const steps = (await this.who.get(this.path)).body['steps'] as Json[];
    return Object.fromEntries(steps.map((one) => [String(one['step']), one['state']]));
  }
}

export const channelOf = async (who: Asker, key: string): Promise<Json> =>
  itemsOf(await who.get(`${AT}/channels`)).find((one) => one['key'] === key) ?? {};
