import { NODE_WORDS } from '@/lib/wording/wiring-parts';
import type { Group } from '../spec';
import { named } from './options';

/** Buses come with a later version of the worker, so they cannot be chosen here yet. */
const kinds = named(NODE_WORDS).filter((one) => one.value === 'socket' || one.value === 'http');

export function nodeGroups(isNew: boolean): Group[] {
  return [
    {
      specs: [
        {
          as: 'text',
          path: 'key',
          label: 'Name of the node',
          hint: 'Short, as on its lid: LH-1. Letters, digits, dot, dash.',
        },
        ...(isNew ? ([{ as: 'choice', path: 'kind', label: 'What it does', options: kinds }] as const) : []),
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
          quantity: 'number',
          hint: 'None for a node that only measures: 0.',
        },
      ],
    },
  ];
}
