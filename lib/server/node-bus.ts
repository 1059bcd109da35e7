/** What the routes of nodes do with a bus: the operator's list, and the password that is never told. */
import 'server-only';
import type { MqttGiven, ModbusBus } from '@/lib/schema/bus';
import type { FieldNode } from '@/lib/schema/yard-view';
import { mayReach, notOnList } from './bus-hosts';
import { Problem } from './errors';
import { seal } from './seal';

export const sealPassword = (password: string): string => seal(password, 'brokers');

/** A node as it would be given again: that it has a password is told, and not asked. */
export function asGiven(node: FieldNode): object {
  if (node.mqtt === null) return node;
  const { host, port, tls, ca, user } = node.mqtt;
  return { ...node, mqtt: { host, port, tls, ca, user } };
}

interface Buses {
  modbus: ModbusBus | null;
  mqtt: Pick<MqttGiven, 'host' | 'port'> | null;
}

/**
 * @param before what stays as it is may be off the list: the worker does not connect to it either
 * @throws Problem at the host that is not on the operator's list
 */
export function refuseUnlisted(given: Buses, before: Buses = { modbus: null, mqtt: null }): void {
  for (const kind of ['modbus', 'mqtt'] as const) {
    const bus = given[kind];
    const was = before[kind];
    if (bus === null || (was !== null && was.host === bus.host && was.port === bus.port)) continue;
    if (!mayReach(bus))
      throw new Problem('not-valid', { errors: [{ path: `${kind}.host`, message: notOnList(bus) }] });
  }
}
