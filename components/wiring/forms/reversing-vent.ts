import type { Group } from '../spec';
import { protection } from './limits';
import { nodeOptions, type Yard } from './options';

const way = (title: string, path: 'open' | 'shut'): Group => ({
  title,
  columns: 2,
  specs: [
    { as: 'number', path: `${path}.number`, label: `Channel number, to ${path}`, quantity: 'whole' },
    { as: 'number', path: `${path}.relay`, label: `Relay on its board, to ${path}`, quantity: 'whole' },
  ],
});

const motor: Group = {
  title: 'Motor',
  columns: 2,
  specs: [
    { as: 'number', path: 'load.watts', label: 'Rated power', quantity: 'number', unit: 'W', empty: 'omit' },
    { as: 'number', path: 'load.volts', label: 'Supply', quantity: 'number', unit: 'V', empty: 'omit' },
    {
      as: 'choice',
      path: 'load.supply',
      label: 'Current',
      options: [
        { value: 'dc', label: 'DC' },
        { value: 'ac', label: 'AC' },
      ],
      empty: 'omit',
      none: 'Not told',
    },
    {
      as: 'number',
      path: 'load.contactAmps',
      label: 'Each contact is rated',
      quantity: 'number',
      unit: 'A',
      empty: 'omit',
    },
  ],
};

const pace: Group = {
  title: 'How it may run',
  specs: [
    {
      as: 'number',
      path: 'longestOn',
      label: 'One way without a break, at most',
      quantity: 'seconds',
      hint: 'What the motor takes from end to end, and a margin over it.',
    },
    {
      as: 'number',
      path: 'deadTime',
      label: 'Wait before it turns back',
      quantity: 'seconds',
      hint: 'For the motor to come to rest. More where its maker asks for more.',
    },
    {
      as: 'number',
      path: 'startsPerHour',
      label: 'Starts an hour each way, at most',
      quantity: 'number',
      empty: 'null',
      hint: 'As its maker allows. Empty: not told.',
    },
  ],
};

export function reversingVentGroups(yard: Yard): Group[] {
  return [
    {
      specs: [
        { as: 'text', path: 'label', label: 'Name', hint: 'As people say it: North vent.' },
        {
          as: 'text',
          path: 'key',
          label: 'Key',
          hint: 'For programs: north-vent makes north-vent-open and north-vent-shut.',
        },
        { as: 'choice', path: 'node', label: 'Node', options: nodeOptions(yard.nodes) },
      ],
    },
    way('The relay that opens', 'open'),
    way('The relay that shuts', 'shut'),
    motor,
    pace,
    protection,
  ];
}
