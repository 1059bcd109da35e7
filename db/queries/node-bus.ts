/** What of a node's bus is kept, and what of it is told. */
import 'server-only';
import { and, eq, isNull } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { channel } from '@/db/schema/channel';
import { node } from '@/db/schema/node';
import type { ModbusBus, MqttBus, MqttGiven, Register } from '@/lib/schema/bus';
import { Refusal } from './refusal';

type Row = typeof node.$inferSelect;

interface Given {
  modbus: ModbusBus | null;
  mqtt: MqttGiven | null;
  registers: Register[];
}
type Kept = Pick<Row, 'modbus' | 'mqtt' | 'busSecret' | 'registers'>;

export function toldBus(row: Row) {
  const { modbus, mqtt, registers, busSecret } = row;
  return { modbus, mqtt: mqtt === null ? null : { ...mqtt, hasPassword: busSecret !== null }, registers };
}

/**
 * The columns of what was given.
 * @param seal hides a password; the key to it is not the database's
 * @throws Refusal where a kept password would be shown to another broker than the one it was given for
 */
export function keptBus(given: Given, before: Kept | null, seal: (password: string) => string): Kept {
  const { modbus, mqtt: asked, registers } = given;
  if (asked === null) return { modbus, registers, mqtt: null, busSecret: null };
  const { password, ...mqtt } = asked;
  if (password !== undefined)
    return { modbus, registers, mqtt, busSecret: password === null ? null : seal(password) };
  const busSecret = before?.busSecret ?? null;
  if (busSecret !== null && !isSameBroker(before?.mqtt ?? null, mqtt))
    throw new Refusal(
      'mqtt.password',
      'Type the password again: the one that is kept was given for another broker.',
    );
  return { modbus, registers, mqtt, busSecret };
}

function isSameBroker(before: MqttBus | null, now: MqttBus): boolean {
  return (
    before !== null &&
    before.host === now.host &&
    before.port === now.port &&
    before.tls === now.tls &&
    before.ca === now.ca
  );
}

/** Whether a board keeps its last state when nobody speaks to it. */
export function keepsState(row: Pick<Row, 'kind' | 'modbus'>): boolean {
  return row.kind === 'modbus' && (row.modbus?.watchdog ?? null) === null;
}

export const NO_HEATER =
  'has no watchdog: it keeps its last state when the network fails, and a heater would go on heating. Put heaters on a node with a lease, or on a board with a watchdog register.';

/** @throws Refusal for a heater on a board that would keep it on */
export async function refuseHeater(holding: Holding, nodeId: string, loadKind: string): Promise<void> {
  if (loadKind !== 'heater') return;
  const [row] = await holding.db
    .select({ key: node.key, kind: node.kind, modbus: node.modbus })
    .from(node)
    .where(and(eq(node.holdingId, holding.id), eq(node.id, nodeId)));
  if (row !== undefined && keepsState(row)) throw new Refusal('load.kind', `Board ${row.key} ${NO_HEATER}`);
}

/** @throws Refusal where a board with a heater would lose its watchdog */
export async function refuseLosingWatchdog(
  holding: Holding,
  nodeId: string,
  kind: string,
  modbus: ModbusBus | null,
): Promise<void> {
  if (!keepsState({ kind, modbus })) return;
  const rows = await holding.db
    .select({ label: channel.label, load: channel.load })
    .from(channel)
    .where(and(eq(channel.holdingId, holding.id), eq(channel.nodeId, nodeId), isNull(channel.removedAt)));
  const heaters = rows.filter(({ load }) => load.kind === 'heater').map(({ label }) => label);
  if (heaters.length > 0)
    throw new Refusal(
      'modbus.watchdog',
      `${heaters.join(', ')} would go on heating when the network fails. Move it off this board first.`,
    );
}
