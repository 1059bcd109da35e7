import { z } from 'zod';
import { Key, wholeSeconds } from './common';

export const NODE_KINDS = ['socket', 'http', 'modbus', 'mqtt'] as const;
export const nodeFields = {
  key: Key,
  kind: z.enum(NODE_KINDS),
  reportEvery: wholeSeconds(1, 3600),
  channels: z.number().int().min(0).max(64),
};
export const NodeCreate = z.strictObject({
  ...nodeFields,
  reportEvery: nodeFields.reportEvery.default(30),
  channels: nodeFields.channels.default(8),
});
export const NodeAmend = z.strictObject(nodeFields).omit({ kind: true }).partial();
