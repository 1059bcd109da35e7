import { POINT_ROLES, PointUnit } from '@/lib/schema/point';
import type { Point } from '@/lib/schema/yard-view';
import type { Group } from '../spec';
import { nodeOptions, roleWords, type Yard } from './options';

const unitWords: Record<string, string> = {
  Cel: 'temperature, °C',
  K: 'temperature difference, K',
  '%RH': 'relative humidity, %',
  '/': 'a share, 0 to 1',
  '%': 'a share, by its old name',
  'W/m2': 'light, W/m²',
  'm3/s': 'air flow, m³/s',
  ppm: 'gas, ppm',
};

const first: Group['specs'] = [
  { as: 'text', path: 'name', label: 'Name', hint: 'As people say it: Bench probe 1.' },
  { as: 'text', path: 'key', label: 'Key', hint: 'As the node sends it: bench-1.' },
  {
    as: 'choice',
    path: 'role',
    label: 'Measures',
    options: POINT_ROLES.map((role) => ({ value: role, label: roleWords(role) })),
  },
  {
    as: 'choice',
    path: 'unit',
    label: 'Unit it is kept in',
    options: PointUnit.options.map((unit) => ({ value: unit, label: unitWords[unit] ?? unit })),
  },
];

const trust = (unit: string | undefined): Group => ({
  title: 'When to trust it',
  note: 'What is out of range, silent or too fast is stored, and never used.',
  columns: 2,
  specs: [
    {
      as: 'number',
      path: 'min',
      label: 'Least it can read',
      quantity: 'number',
      empty: 'null',
      ...unitOf(unit),
    },
    {
      as: 'number',
      path: 'max',
      label: 'Most it can read',
      quantity: 'number',
      empty: 'null',
      ...unitOf(unit),
    },
    {
      as: 'number',
      path: 'staleAfter',
      label: 'Silent after',
      quantity: 'seconds',
      empty: 'null',
      hint: 'Empty: three reports of its node.',
    },
    {
      as: 'number',
      path: 'maxRate',
      label: 'Fastest change a second',
      quantity: 'number',
      empty: 'null',
      hint: 'Empty: no limit.',
      ...unitOf(unit),
    },
    {
      as: 'number',
      path: 'frozenAfter',
      label: 'Frozen after',
      quantity: 'minutes',
      empty: 'null',
      hint: 'The same to the last bit for so long. Empty: never.',
    },
    {
      as: 'choice',
      path: 'sensor',
      label: 'Sensor',
      options: [{ value: 'one-wire', label: 'one-wire probe' }],
      empty: 'null',
      none: 'Another',
      hint: 'A one-wire probe says −127 or 85 when its cable is bad; these two are then never believed.',
    },
  ],
});

const unitOf = (unit: string | undefined) => ({ unit: unit === 'Cel' ? '°C' : (unit ?? '') });

export function pointGroups(yard: Yard, point: Point | null): Group[] {
  if (point !== null && point.derived !== null) return [{ specs: first }, trust(point.unit)];
  return [
    {
      specs: [...first, { as: 'choice', path: 'node', label: 'Wired to', options: nodeOptions(yard.nodes) }],
    },
    {
      title: 'Calibration',
      note: 'What is used = what is read × gain + offset. From now on; readings before keep the calibration of their time.',
      specs: [
        { as: 'number', path: 'offset', label: 'Offset', quantity: 'number', ...unitOf(point?.unit) },
        { as: 'number', path: 'gain', label: 'Gain', quantity: 'number' },
      ],
    },
    trust(point?.unit),
  ];
}
