import type { Group } from '../spec';
import { channelOptions, pointOptions, sourceOptions, type Yard } from './options';

export function loopGroups(yard: Yard): Group[] {
  return [
    {
      specs: [
        { as: 'text', path: 'name', label: 'Name' },
        { as: 'choice', path: 'source', label: 'Through', options: sourceOptions(yard.sources) },
        { as: 'choice', path: 'channel', label: 'Blown by', options: channelOptions(yard.channels) },
        {
          as: 'choice',
          path: 'intake',
          label: 'Air going in is measured at',
          options: pointOptions(yard.points, ['loop-intake', 'house-air']),
        },
        {
          as: 'choice',
          path: 'return',
          label: 'Air coming back is measured at',
          options: pointOptions(yard.points, ['loop-return']),
        },
      ],
    },
  ];
}

export function interlockGroups(yard: Yard): Group[] {
  return [
    {
      specs: [
        { as: 'choice', path: 'channel', label: 'Channel', options: channelOptions(yard.channels) },
        {
          as: 'choice',
          path: 'kind',
          label: 'How it depends',
          options: [
            { value: 'never-with', label: 'never runs with' },
            { value: 'needs', label: 'runs only while there runs' },
          ],
        },
        { as: 'choice', path: 'other', label: 'Other channel', options: channelOptions(yard.channels) },
        {
          as: 'number',
          path: 'delay',
          label: 'Wait between the two',
          quantity: 'seconds',
          hint: 'For a motor to come to rest, or a damper to open.',
        },
        { as: 'check', path: 'frostMayBreak', label: 'Frost may break it' },
      ],
    },
  ];
}
