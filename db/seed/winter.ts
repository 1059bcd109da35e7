/**
 * What people did in the demo's winter, and what went wrong in it: by how many days ago (local days, 0 is today) and at
 * what time of day. Only causes stand here; what came of them is for the yard's physics and the core to say.
 */
import type { z } from 'zod';
import type { HeapEntryCreate } from '@/lib/schema/heap';
import type { RuleBodyInput } from '@/lib/schema/rule';
import type { State } from '@/lib/control/types';
import { longHouse } from './long-house';

interface At {
  house: string;
  daysAgo: number;
  /** HH:MM in the house's zone. */
  time: string;
}

/** What an entry does to the heap itself. */
export type HeapEffect =
  | { kind: 'feed'; massKg: number; moisture: number; digestibleJPerKgDry: number; tempC: number }
  | { kind: 'turn' };

export type HeapDeed = At & {
  by: string;
  entry: z.input<typeof HeapEntryCreate>;
  /** Left out: it is written down, and the heap takes no notice. */
  effect?: HeapEffect;
};

export type PersonDeed = At & { by: string } & (
    | { does: 'hand'; channel: string; state: State; seconds: number }
    | { does: 'auto'; channel: string }
    | { does: 'force'; rule: string; why: string; body: RuleBodyInput }
    | { does: 'acknowledge'; note: string }
  );

/** A probe whose plug came out: its node sends no record of it for so long. */
export type PlugOut = At & { point: string; minutes: number };

const GROWER = 'grower@larkmoor.example';
const OWNER = 'owner@larkmoor.example';

/** Who says, when the controller is put in, that the heaps of a house are ready. */
export const readyBy: Record<string, string> = {
  'long-house': OWNER,
  'prop-house': OWNER,
  'beck-house': 'owner@stonebeck.example',
};

/** The body of a demo rule, to change from. */
function bodyOf(name: string): RuleBodyInput {
  const found = longHouse.rules.find((rule) => rule.name === name);
  if (found === undefined) throw new Error(`The demo has no rule ${name}.`);
  return found.body;
}

const gate = bodyOf('Gate-heap fan by the bench');

export const personDeeds: PersonDeed[] = [
  {
    ...{ house: 'long-house', daysAgo: 17, time: '10:20', by: GROWER, does: 'force' },
    rule: 'gate-heap-fan-by-the-bench',
    why: 'The heap comes back more slowly since the cold week: shorter draws, and a longer rest after each.',
    body: {
      ...gate,
      ...(gate.rest && { rest: { ...gate.rest, longestDraw: 900, least: 2100 } }),
    },
  },
  {
    ...{ house: 'long-house', daysAgo: 26, time: '21:35', by: GROWER, does: 'hand' },
    ...{ channel: 'gate-heap-fan', state: 'on', seconds: 1800 },
  },
  {
    ...{ house: 'prop-house', daysAgo: 20, time: '14:05', by: GROWER, does: 'hand' },
    ...{ channel: 'gable-vent', state: 'on', seconds: 1200 },
  },
  {
    ...{ house: 'long-house', daysAgo: 11, time: '10:05', by: OWNER, does: 'hand' },
    ...{ channel: 'gate-heap-fan', state: 'off', seconds: 5400 },
  },
  {
    ...{ house: 'long-house', daysAgo: 9, time: '08:10', by: OWNER, does: 'hand' },
    ...{ channel: 'ground-fan', state: 'off', seconds: 7200 },
  },
  { house: 'long-house', daysAgo: 9, time: '09:02', by: OWNER, does: 'auto', channel: 'ground-fan' },
  {
    ...{ house: 'beck-house', daysAgo: 6, time: '18:40', by: 'owner@stonebeck.example', does: 'hand' },
    ...{ channel: 'beck-heap-fan', state: 'on', seconds: 1800 },
  },
  {
    ...{ house: 'long-house', daysAgo: 12, time: '23:58', by: GROWER, does: 'acknowledge' },
    note: 'Plug of the air probe was out. Dried it and pushed it home.',
  },
  {
    ...{ house: 'long-house', daysAgo: 1, time: '20:31', by: GROWER, does: 'acknowledge' },
    note: 'Bench probe 1 again: the cable is chafed where the trolley passes.',
  },
];

export const plugsOut: PlugOut[] = [
  { house: 'long-house', point: 'house-air', daysAgo: 12, time: '23:20', minutes: 55 },
  { house: 'long-house', point: 'bench-1', daysAgo: 1, time: '20:05', minutes: 48 },
];
