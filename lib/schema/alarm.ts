import { z } from 'zod';
import { PageQuery, Text } from './common';

export const ALARM_KINDS = [
  'point-silent',
  'point-not-trusted',
  'point-unsteady',
  'frost',
  'node-lost',
  'control-not-running',
  'core-under-floor',
  'core-not-good',
  'frost-without-reading',
  'hand-off-in-frost',
  'hand-on-in-frost',
  'interlock-blocks-frost',
  'high-limit',
  'no-gain',
  'daily-limit',
  'rest-ran-to-most',
  'fan-standing',
  'runs-though-off',
  'relay-does-not-follow',
  'frozen-point-in-frost',
  'cloned-token',
  'epoch-too-far',
] as const;
export type AlarmKind = (typeof ALARM_KINDS)[number];

export const AlarmQuery = z.strictObject({
  state: z.enum(['active', 'history', 'all']).default('active'),
  ...PageQuery.shape,
});
export const AlarmAcknowledge = z.strictObject({ note: Text.optional() });
