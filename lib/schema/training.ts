/** Faults that people practise on, in the simulated yard only. */
import { z } from 'zod';
import { wholeSeconds } from './common';

export const FAULT_KINDS = [
  'dead-sensor',
  'lying-85',
  'swapped-probes',
  'welded-relay',
  'dead-fan',
  'loop-leak',
  'lost-link',
  'power-cut',
] as const;
export type FaultKind = (typeof FAULT_KINDS)[number];

/** What each is about: a point, two points, a channel, or the node as a whole. */
export const FAULT_ABOUT: Record<FaultKind, 'point' | 'two-points' | 'channel' | 'node'> = {
  'dead-sensor': 'point',
  'lying-85': 'point',
  'swapped-probes': 'two-points',
  'welded-relay': 'channel',
  'dead-fan': 'channel',
  'loop-leak': 'node',
  'lost-link': 'node',
  'power-cut': 'node',
};

/** It ends by itself: nobody finds the demo holding broken a week later. */
const SECONDS_MOST = 7200;

export const TrainingOrder = z
  .strictObject({
    fault: z.enum(FAULT_KINDS),
    on: z.boolean(),
    /** Key of a point. */
    point: z.string().min(1).optional(),
    /** Of two that are swapped, the other. */
    other: z.string().min(1).optional(),
    /** Number of a channel. */
    channel: z.number().int().positive().optional(),
    seconds: wholeSeconds(1, SECONDS_MOST).default(1800),
  })
  .superRefine((order, context) => {
    const about = FAULT_ABOUT[order.fault];
    const needs = (path: 'point' | 'other' | 'channel', message: string) => {
      if (order[path] === undefined) context.addIssue({ code: 'custom', path: [path], message });
    };
    if (about === 'point' || about === 'two-points') needs('point', 'Say which point.');
    if (about === 'two-points') needs('other', 'Say with which other point.');
    if (about === 'two-points' && order.other !== undefined && order.other === order.point) {
      context.addIssue({ code: 'custom', path: ['other'], message: 'Choose another point than the first.' });
    }
    if (about === 'channel') needs('channel', 'Say which channel.');
  });
export type TrainingOrder = z.output<typeof TrainingOrder>;

export const TrainingFault = z.strictObject({
  fault: z.enum(FAULT_KINDS),
  point: z.string().nullable(),
  other: z.string().nullable(),
  channel: z.number().nullable(),
  /** When it ends by itself. */
  until: z.string(),
});
export type TrainingFault = z.infer<typeof TrainingFault>;

export const Training = z.strictObject({
  /** Whether a node of the simulated yard drives this house; in any other there is nothing to practise on. */
  available: z.boolean(),
  /** What can be chosen: points and channels of that node. */
  points: z.array(z.string()),
  channels: z.array(z.number()),
  faults: z.array(TrainingFault),
});
export type Training = z.infer<typeof Training>;
