import { LOAD_WORDS } from '@/lib/wording/wiring-load';
import type { Group } from '../spec';
import { limitGroups } from './limits';
import { named, nodeOptions, sourceOptions, type Yard } from './options';

const load: Group = {
  title: 'Load',
  columns: 2,
  specs: [
    { as: 'choice', path: 'load.kind', label: 'Kind', options: named(LOAD_WORDS) },
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
      label: 'Contact is rated',
      quantity: 'number',
      unit: 'A',
      empty: 'omit',
    },
    {
      as: 'choice',
      path: 'contact',
      label: 'Wired to contact',
      options: [
        { value: 'NO', label: 'NO, normally open' },
        { value: 'NC', label: 'NC, normally closed' },
      ],
    },
  ],
};

const pace: Group = {
  title: 'How it may switch',
  specs: [
    { as: 'number', path: 'minOn', label: 'Once on, at least', quantity: 'seconds' },
    { as: 'number', path: 'minOff', label: 'Once off, at least', quantity: 'seconds' },
  ],
};

const helps: Group = {
  columns: 1,
  specs: [
    {
      as: 'check',
      path: 'frostHelp',
      label: 'Helps against frost',
      hint: 'Runs when the house falls under its frost limit, whatever the rules say.',
    },
  ],
};

export function channelGroups(yard: Yard): Group[] {
  return [
    {
      specs: [
        { as: 'text', path: 'label', label: 'Name', hint: 'As people say it: Gate-heap fan.' },
        { as: 'text', path: 'key', label: 'Key', hint: 'For programs: gate-heap-fan.' },
      ],
    },
    {
      title: 'Where it is wired',
      columns: 3,
      specs: [
        { as: 'number', path: 'number', label: 'Channel number', quantity: 'whole' },
        { as: 'choice', path: 'node', label: 'Node', options: nodeOptions(yard.nodes) },
        { as: 'number', path: 'relay', label: 'Relay on its board', quantity: 'whole' },
      ],
    },
    load,
    {
      columns: 1,
      specs: [
        {
          as: 'choice',
          path: 'source',
          label: 'Draws from',
          options: sourceOptions(yard.sources),
          empty: 'null',
          none: 'No source',
          hint: 'All channels of a source share its draws and rests.',
        },
      ],
    },
    helps,
    pace,
    ...limitGroups(yard),
  ];
}
