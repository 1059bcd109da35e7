/** A house of its own in a fast program, for scenarios whose times are worked out on paper. Times are seconds of app time. */
import type { RunningApp } from '../support/app';
import { listOf, type Body, type OutsideApi } from '../support/outside-api';
import { joinNode, type OutsideHouse } from '../support/outside-house';
import type { Brings, OutsideNode } from '../support/outside-node';
import { until } from '../support/until';

export interface Told {
  at: number;
  to: string;
  claim: string;
  number: number | null;
  because: Body;
}

let made = 0;
/** Readings stay in use through every scenario, unless a point is told otherwise. */
const LONG = 80_000;

export const FAN = { kind: 'motor' };

export class Scene {
  private constructor(
    private readonly app: RunningApp,
    readonly api: OutsideApi,
    readonly house: OutsideHouse,
    private readonly rate: number,
  ) {}
  node!: OutsideNode;

  get at(): string {
    return `/houses/${this.house.slug}`;
  }

  static async open(
    app: RunningApp,
    api: OutsideApi,
    rate: number,
    {
      house = {},
      source = {},
      points = {},
    }: { house?: object; source?: object; points?: Record<string, object> } = {},
  ): Promise<Scene> {
    const n = ++made;
    const place = { name: `Scene ${process.pid} ${n}`, zone: 'UTC', latitude: 54.2, longitude: -2.3 };
    const { slug } = await api.make('/houses', { ...place, frostLimit: 1, ...house });
    const at = `/houses/${String(slug)}`;
    const { token } = await api.make(`${at}/nodes`, { key: 'N', kind: 'socket', channels: 4 });
    const roles = {
      bench: 'bench',
      air: 'house-air',
      core: 'heap-core',
      intake: 'loop-intake',
      back: 'loop-return',
    };
    const others = Object.keys(points).filter((key) => !(key in roles));
    for (const [key, role] of [...Object.entries(roles), ...others.map((one) => [one, 'other'] as const)]) {
      const point = { key, node: 'N', name: key, role, unit: 'Cel', staleAfter: LONG };
      await api.make(`${at}/points`, { ...point, ...points[key] });
    }
    const heap = { name: `Heap ${process.pid} ${n}`, kind: 'heap', corePoint: 'core', ...source };
    await api.make(`${at}/sources`, heap);
    return new Scene(app, api, { slug: String(slug), token: String(token), nodeKey: 'N' }, rate);
  }

  /** A channel on the relay of its number. */
  async channel(number: number, key: string, more: object = {}): Promise<void> {
    const source = listOf((await this.api.get(`${this.at}/sources`)).body)[0]?.['slug'];
    await this.api.make(`${this.at}/channels`, {
      ...{ number, node: 'N', relay: number, key, label: key, source, frostHelp: true, contact: 'NO' },
      ...{ load: FAN, minOn: 0, minOff: 0, ...more },
    });
  }

  /** A rule in force: band 4 / 7.5 °C on the bench. @returns its id */
  async rule(channel: string, body: object = {}): Promise<string> {
    const band = [{ from: '00:00', low: 4, high: 7.5 }];
    const rule = await this.api.make(`${this.at}/rules`, {
      ...{ name: channel, channel },
      body: { purpose: 'warm', point: 'bench', band, ...body },
    });
    const why = { why: 'a scenario', acceptUnproved: true };
    await this.api.make(`/rules/${String(rule['id'])}/force`, why);
    return String(rule['id']);
  }

  async join(brings: Brings = {}): Promise<void> {
    this.node = await joinNode(this.app.url, this.house, brings);
  }

  now(): number {
    const welcome = this.node.frames.find(({ frame }) => frame.type === 'welcome');
    if (welcome === undefined) throw new Error('no welcome came');
    return Number(welcome.frame['now']) + ((performance.now() - welcome.at) / 1000) * this.rate;
  }

  /** Sends readings taken now. @returns their time */
  async send(values: Record<string, number>): Promise<number> {
    const t = this.now();
    const ack = await this.node.readings(Object.entries(values).map(([n, v]) => ({ n, u: 'Cel', t, v })));
    if (ack.refused.length > 0) throw new Error(JSON.stringify(ack.refused));
    return t;
  }

  /** A reading of the current clamp `amps`, taken now. */
  async sendAmps(v: number): Promise<void> {
    await this.node.readings([{ n: 'amps', u: 'A', t: this.now(), v }]);
  }

  hand(number: number, body: object): Promise<Body> {
    return this.api.make(`${this.at}/channels/${number}/hand`, body);
  }

  auto(number: number): Promise<unknown> {
    return this.api.call('DELETE', `${this.at}/channels/${number}/hand`);
  }

  /** Switchings of a channel, first one first. */
  async told(number: number): Promise<Told[]> {
    const answer = await this.api.get(`${this.at}/switchings?channel=${number}`);
    return listOf(answer.body)
      .reverse()
      .map((one) => ({
        at: Date.parse(String(one['at'])) / 1000,
        to: String(one['to']),
        claim: String(one['claim']),
        number: one['number'] as number | null,
        because: (listOf(one, 'ladder').at(-1)?.['because'] ?? {}) as Body,
      }));
  }

  /** Waits until so many switchings of a channel are told. */
  async waitTold(number: number, count: number, limitMs = 12_000): Promise<Told[]> {
    let told: Told[] = [];
    await until(
      `${count} switchings of channel ${number}`,
      async () => (told = await this.told(number)).length >= count,
      limitMs,
    ).catch((error: unknown) => {
      throw new Error(`${String(error)}: ${JSON.stringify(told)}`);
    });
    return told;
  }

  async state(number: number): Promise<Body> {
    const body = (await this.api.get(`${this.at}/state`)).body;
    const channel = listOf(body, 'channels').find((one) => one['number'] === number);
    if (channel === undefined) throw new Error(`channel ${number} is not told`);
    return channel;
  }

  async source(): Promise<Body> {
    return listOf((await this.api.get(`${this.at}/state`)).body, 'sources')[0] ?? {};
  }

  async claim(number: number, claim: string, limitMs = 5000): Promise<void> {
    let last: unknown;
    await until(
      `channel ${number} is held by ${claim}`,
      async () => (last = (await this.state(number))['claim']) === claim,
      limitMs,
    ).catch((error: unknown) => {
      throw new Error(`${String(error)}, but by ${String(last)}`);
    });
  }

  /** Waits for seconds of app time. */
  async pass(seconds: number): Promise<void> {
    const end = this.now() + seconds;
    await until(`${seconds} s pass`, () => this.now() >= end, (seconds / this.rate) * 1000 + 5000);
  }
}
