/** A house made through the interface, as somebody would who knows only its description. */
import type { Body, OutsideApi } from './outside-api';
import { OutsideNode, type Brings } from './outside-node';
import { until } from './until';

export interface OutsideHouse {
  slug: string;
  token: string;
  nodeKey: string;
}

let made = 0;

/** House with one node, two house points, a core, two fans on one heap and one rule for the first fan. */
export async function makeHouse(
  api: OutsideApi,
  rule: Record<string, unknown> = {},
  { staleAfter = 6 } = {},
): Promise<OutsideHouse> {
  const name = `Outside house ${process.pid} ${++made}`;
  const house = await api.make('/houses', {
    name,
    zone: 'Europe/London',
    latitude: 54.2,
    longitude: -2.3,
    altitude: 310,
    frostLimit: 1,
    frostAlarm: 0,
  });
  const slug = String(house['slug']);
  const at = `/houses/${slug}`;
  const nodeKey = `N-${made}`;
  const node = await api.make(`${at}/nodes`, { key: nodeKey, kind: 'socket', reportEvery: 30, channels: 4 });
  const point = (key: string, role: string, more: object = {}): Promise<Body> =>
    api.make(`${at}/points`, { key, node: nodeKey, name: key, role, unit: 'Cel', ...more });
  await point('bench-1', 'bench', { staleAfter });
  await point('house-air', 'house-air');
  await point('core', 'heap-core');
  await api.make(`${at}/sources`, { name: `Heap ${process.pid} ${made}`, kind: 'heap', corePoint: 'core' });
  const source = `heap-${process.pid}-${made}`;
  const channel = (number: number, key: string): Promise<Body> =>
    api.make(`${at}/channels`, {
      number,
      node: nodeKey,
      relay: number,
      key,
      label: key,
      source,
      frostHelp: true,
      contact: 'NO',
      load: { kind: 'motor', watts: 12, volts: 24, supply: 'dc', contactAmps: 5 },
      minOn: 0,
      minOff: 0,
    });
  await channel(1, 'fan-1');
  await channel(2, 'fan-2');
  await putIntoForce(api, slug, 'fan-1', rule);
  return { slug, token: String(node['token']), nodeKey };
}

/** Makes a rule of a channel (band 4 / 7.5 °C unless told otherwise) and puts it into force. */
export async function putIntoForce(
  api: OutsideApi,
  house: string,
  channel: string,
  body: Record<string, unknown>,
): Promise<string> {
  const rule = await api.make(`/houses/${house}/rules`, {
    name: `${channel} of ${house}`,
    channel,
    body: { purpose: 'warm', point: 'bench-1', band: [{ from: '00:00', low: 4, high: 7.5 }], ...body },
  });
  await api.make(`/rules/${String(rule['id'])}/force`, { why: 'outside test', acceptUnproved: true });
  return String(rule['id']);
}

/** Connects as a node does: again and again while the worker is away. */
export async function joinNode(url: string, house: OutsideHouse, brings: Brings = {}): Promise<OutsideNode> {
  let node: OutsideNode | undefined;
  await until(
    'the node is taken in',
    async () => {
      node = await OutsideNode.connect(url, house.token, house.nodeKey, 4, brings).catch(() => undefined);
      return node !== undefined;
    },
    20_000,
  );
  if (node === undefined) throw new Error('no node');
  return node;
}

/** A pack with one absolute time for all. */
export function pack(
  values: Record<string, number>,
  at = Date.now() / 1000,
): { n: string; u: string; t: number; v: number }[] {
  return Object.entries(values).map(([n, v]) => ({ n, u: 'Cel', t: at, v }));
}
