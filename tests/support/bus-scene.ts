// A house for tests of buses: that of the field's tests, its node behind a broker or a board.
import { sql } from 'drizzle-orm';
import { touchPlan } from '@/db/queries/plan';
import type { ModbusBus, MqttBus, Register } from '@/lib/schema/bus';
import { seal } from '@/lib/server/seal';
import type { TestBroker } from './broker';
import { PASSWORD } from './broker';
import { makeScene, rows, type Scene } from './field-scene';
import type { Way } from './outside-mqtt-node';

export interface BusScene extends Scene {
  nodeId: string;
}

async function rewired(scene: Scene, set: ReturnType<typeof sql>): Promise<BusScene> {
  return scene.holding.db.transaction(async (db) => {
    const { rows: found } = await db.execute<{ id: string }>(
      sql`update node set ${set} where holding_id = ${scene.holding.id} returning id`,
    );
    await touchPlan({ id: scene.holding.id, db }, scene.houseId);
    return { ...scene, nodeId: found[0]?.id ?? '' };
  });
}

type More = Parameters<typeof makeScene>;

function toBroker(broker: TestBroker, more: Partial<MqttBus> = {}): MqttBus {
  return { host: 'localhost', port: broker.port, tls: true, ca: broker.ca.trim(), user: 'worker', ...more };
}

export async function reachBroker(scene: BusScene, broker: TestBroker): Promise<void> {
  await rewired(scene, sql`mqtt = ${JSON.stringify(toBroker(broker))}::jsonb`);
}

export async function mqttScene(
  broker: TestBroker,
  more: Partial<MqttBus> = {},
  ...scene: More
): Promise<BusScene> {
  const mqtt = toBroker(broker, more);
  return rewired(
    await makeScene(...scene),
    sql`kind = 'mqtt', mqtt = ${JSON.stringify(mqtt)}::jsonb, bus_secret = ${seal(PASSWORD, 'brokers')}`,
  );
}

export function wayTo(broker: TestBroker, scene: BusScene): Way {
  return {
    port: broker.port,
    ca: broker.ca,
    user: 'node',
    password: PASSWORD,
    id: scene.nodeId,
    token: scene.token,
  };
}

export async function modbusScene(
  modbus: Partial<ModbusBus> & { port: number },
  registers: Register[],
  ...scene: More
): Promise<BusScene> {
  const bus: ModbusBus = { host: '127.0.0.1', unit: 1, timeout: 1, firstCoil: 0, watchdog: null, ...modbus };
  return rewired(
    await makeScene(...scene),
    sql`kind = 'modbus', report_every_s = 1, modbus = ${JSON.stringify(bus)}::jsonb, registers = ${JSON.stringify(registers)}::jsonb`,
  );
}

/** Readings of a point as they are stored, oldest first. */
export function readingsOf(scene: BusScene, key: string) {
  return rows<{ value: number; at: Date }>(
    scene,
    sql`select r.value, r.at from reading r join point p on p.number = r.point
        where p.holding_id = ${scene.holding.id} and p.key = ${key} order by r.at`,
  );
}

export async function linkTrouble(scene: BusScene): Promise<string | null> {
  const [row] = await rows<{ why: string | null }>(
    scene,
    sql`select status ->> 'linkTrouble' as why from node where id = ${scene.nodeId}`,
  );
  return row?.why ?? null;
}
