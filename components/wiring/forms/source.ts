import type { Group } from '../spec';
import { pointOptions, type Yard } from './options';

export function sourceGroups(yard: Yard): Group[] {
  return [
    {
      specs: [
        { as: 'text', path: 'name', label: 'Name' },
        {
          as: 'choice',
          path: 'kind',
          label: 'Kind',
          options: [
            { value: 'heap', label: 'compost heap' },
            { value: 'ground', label: 'ground tubes' },
            { value: 'heater', label: 'heater' },
            { value: 'other', label: 'other' },
          ],
        },
        {
          as: 'choice',
          path: 'corePoint',
          label: 'Core is measured at',
          options: pointOptions(yard.points, ['heap-core', 'ground']),
          empty: 'null',
          none: 'Not measured',
        },
        {
          as: 'choice',
          path: 'basePoint',
          label: 'Beside the pipe is measured at',
          options: pointOptions(yard.points, ['heap-base']),
          empty: 'null',
          none: 'Not measured',
        },
      ],
    },
    {
      title: 'What it may give',
      specs: [
        {
          as: 'number',
          path: 'coreFloor',
          label: 'No draw while the core is under',
          quantity: 'temperature',
          empty: 'null',
          hint: 'Not even frost goes under it. Empty: no floor.',
        },
        {
          as: 'number',
          path: 'dailyLimit',
          label: 'Draws in 24 h, at most',
          quantity: 'hours',
          empty: 'null',
          hint: 'All its fans together. Empty: no limit.',
        },
      ],
    },
    {
      title: 'A new heap is ready',
      note: 'A young heap must heat through before it is drawn on. Leave empty where it does not matter.',
      nullUnless: { path: 'ready', unless: 'ready.level' },
      specs: [
        {
          as: 'number',
          path: 'ready.level',
          label: 'once its core is above',
          quantity: 'temperature',
          empty: 'null',
        },
        { as: 'number', path: 'ready.for', label: 'without a break for', quantity: 'hours' },
      ],
    },
  ];
}
