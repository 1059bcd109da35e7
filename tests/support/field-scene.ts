// A house for tests of the worker: one node, two house points, a core, two fans on one heap, one rule for the first.
import { randomUUID } from 'node:crypto';
import { eq, sql } from 'drizzle-orm';
import { everyHolding, type Holding } from '@/db/client';
import { addPersonCommand } from '@/db/queries/person-command';
import { touchPlan } from '@/db/queries/plan';
import { organization } from '@/db/schema/auth';
import { rule, ruleVersion } from '@/db/schema/rule';
import type { DemoHouse } from '@/db/seed/demo-house';
import { writeHouse, type SeededHouse } from '@/db/seed/write-house';
import type { RuleBodyInput } from '@/lib/schema/rule';
import type { SenmlRecord } from './outside-node';

export interface Scene extends SeededHouse {
  holding: Holding;
  token: string;
  fan: string;
}

export type FanRule = Partial<RuleBodyInput>;

function fan(number: number, more: Partial<DemoHouse['channels'][number]>): DemoHouse['channels'][number] {
  return {
    number,
    node: 'N-1',
    relay: number,
    key: `fan-${number}`,
    label: `Fan ${number}`,
    source: 'heap',
    frostHelp: number === 1,
    contact: 'NO',
    load: { kind: 'motor', watts: 12 },
    minOn: 0,
    minOff: 0,
    ...more,
  };
}

/** Points are silent after 6 s and frost begins under 1 °C, so that a test need not wait long or freeze by accident. */
export async function makeScene(
  ruleMore: FanRule = {},
  fanMore: Partial<DemoHouse['channels'][number]> = {},
): Promise<Scene> {
  const id = randomUUID();
  const holding: Holding = { id, db: everyHolding() };
  await holding.db.insert(organization).values({ id, name: 'Test holding', slug: id });
  const house: DemoHouse = {
    house: {
      name: 'Test house',
      zone: 'Europe/London',
      latitude: 54.2,
      longitude: -2.3,
      altitude: 310,
      frostLimit: 1,
      frostAlarm: 0,
    },
    nodes: [{ key: 'N-1', kind: 'socket', reportEvery: 30, channels: 4 }],
    points: [
      {
        key: 'bench-1',
        node: 'N-1',
        name: 'Bench',
        role: 'bench',
        unit: 'Cel',
        min: -40,
        max: 60,
        staleAfter: 6,
      },
      { key: 'house-air', node: 'N-1', name: 'Air', role: 'house-air', unit: 'Cel' },
      { key: 'core', node: 'N-1', name: 'Core', role: 'heap-core', unit: 'Cel' },
      { key: 'humidity', node: 'N-1', name: 'Humidity', role: 'humidity', unit: '%RH' },
    ],
    sources: [{ name: 'Heap', kind: 'heap', corePoint: 'core' }],
    channels: [fan(1, fanMore), fan(2, {})],
    loops: [],
    interlocks: [],
    rules: [
      {
        name: 'Fan by the bench',
        channel: 'fan-1',
        why: 'test',
        body: {
          purpose: 'warm',
          point: 'bench-1',
          band: [{ from: '00:00', low: 4, high: 7.5 }],
          ...ruleMore,
        },
      },
    ],
    proved: ['fan-1', 'fan-2'],
  };
  const seeded = await writeHouse(holding, house, 'test@example.org', new Date('2026-01-01T00:00:00Z'));
  return {
    ...seeded,
    holding,
    token: seeded.secrets[0]?.token ?? '',
    fan: seeded.channelIds.get('fan-1') ?? '',
  };
}

/** A SenML pack of temperatures, stamped `t` (Unix seconds) or now. */
export function pack(values: Record<string, number>, t: number = Date.now() / 1000): SenmlRecord[] {
  return Object.entries(values).map(([n, v]) => ({ n, u: 'Cel', t, v }));
}

type Order = Parameters<typeof addPersonCommand>[2]['body'];

export async function give(scene: Scene, body: Order): Promise<number> {
  return scene.holding.db.transaction((db) =>
    addPersonCommand({ id: scene.holding.id, db }, scene.houseId, {
      at: new Date(),
      by: 'test@example.org',
      body,
    }),
  );
}

/** Puts another body of the fan's rule into force, as a route would. */
export async function force(scene: Scene, more: FanRule): Promise<void> {
  await scene.holding.db.transaction(async (db) => {
    const [row] = await db
      .select({ version: ruleVersion })
      .from(ruleVersion)
      .innerJoin(rule, eq(rule.id, ruleVersion.ruleId))
      .where(eq(rule.houseId, scene.houseId));
    if (row === undefined) throw new Error('the scene has no rule');
    await db
      .update(ruleVersion)
      .set({ body: { ...row.version.body, ...(more as object) } })
      .where(eq(ruleVersion.id, row.version.id));
    await touchPlan({ id: scene.holding.id, db }, scene.houseId);
  });
}

export async function rows<Row extends Record<string, unknown>>(
  scene: Scene,
  query: ReturnType<typeof sql>,
): Promise<Row[]> {
  const { rows } = await scene.holding.db.execute(query);
  return rows as Row[];
}

/** Switchings of a channel, oldest first. */
export function switchings(scene: Scene, channelId = scene.fan) {
  return rows<{ from: string; to: string; claim: string; number: string | null; trip: string | null }>(
    scene,
    sql`select "from", "to", claim, number, trip from switching where channel_id = ${channelId} order by at, id`,
  );
}
