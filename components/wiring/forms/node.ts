import type { FieldNode } from '@/lib/schema/yard-view';
import { NODE_WORDS } from '@/lib/wording/wiring-parts';
import type { Group } from '../spec';
import { modbusGroups, mqttGroups } from './bus';
import { named } from './options';

/** @param node null: a new one, of which the kind is asked too; it stays what it is */
export function nodeGroups(node: FieldNode | null): Group[] {
  const own: Group = {
    specs: [
      {
        as: 'text',
        path: 'key',
        label: 'Name of the node',
        hint: 'Short, as on its lid: LH-1. Letters, digits, dot, dash.',
      },
      ...(node === null
        ? ([{ as: 'choice', path: 'kind', label: 'What it does', options: named(NODE_WORDS) }] as const)
        : []),
      {
        as: 'number',
        path: 'reportEvery',
        label: 'Reports every',
        quantity: 'seconds',
        hint: 'A point that is silent for three of these is not trusted.',
      },
      {
        as: 'number',
        path: 'channels',
        label: 'Relays on its board',
        quantity: 'whole',
        hint: 'None for a node that only measures: 0.',
      },
    ],
  };
  if (node === null) {
    const when = (is: string) => (group: Group) => ({ ...group, when: { path: 'kind', is } });
    return [own, ...modbusGroups().map(when('modbus')), ...mqttGroups(false).map(when('mqtt'))];
  }
  if (node.kind === 'modbus') return [own, ...modbusGroups()];
  return node.kind === 'mqtt' ? [own, ...mqttGroups(node.mqtt?.hasPassword === true)] : [own];
}
