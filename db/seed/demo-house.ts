/** A house of the demo holdings, in the same bodies that a person or program would send. */
import type { z } from 'zod';
import type { RuleBodyInput } from '@/lib/schema/rule';
import type { ChannelCreate, InterlockCreate } from '@/lib/schema/channel';
import type { HouseCreate } from '@/lib/schema/house';
import type { NodeCreate } from '@/lib/schema/node';
import type { PointCreate } from '@/lib/schema/point';
import type { LoopCreate, SourceCreate } from '@/lib/schema/source';

export interface DemoHouse {
  house: z.input<typeof HouseCreate>;
  nodes: z.input<typeof NodeCreate>[];
  points: z.input<typeof PointCreate>[];
  sources: z.input<typeof SourceCreate>[];
  channels: z.input<typeof ChannelCreate>[];
  loops: z.input<typeof LoopCreate>[];
  interlocks: z.input<typeof InterlockCreate>[];
  rules: { name: string; channel: string; why: string; body: RuleBodyInput }[];
  /** Keys of channels whose wiring was proved in the autumn. */
  proved: string[];
}

type Point = z.input<typeof PointCreate>;

/** A one-wire temperature probe on a node, with limits that its place can honestly reach. */
export function probe(
  node: string,
  key: string,
  name: string,
  role: Point['role'],
  more: Partial<Point> = {},
): Point {
  return { key, node, name, role, unit: 'Cel', min: -40, max: 85, sensor: 'one-wire', ...more };
}

/** What reads anything but a temperature, with the least and greatest that it can read. */
export function gauge(
  node: string,
  key: string,
  name: string,
  reads: Pick<Point, 'role' | 'unit'>,
  [min, max]: [number, number],
): Point {
  return { key, node, name, ...reads, min, max };
}

/** The season in which the demo houses are kept warm. */
export const winter = { from: '10-01', to: '04-30' };
