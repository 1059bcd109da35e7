import * as nodes from '@/db/queries/node';
import { NodeCreate } from '@/lib/schema/node';
import { merged } from '@/lib/server/check';
import { asGiven, refuseUnlisted, sealPassword } from '@/lib/server/node-bus';
import { serve } from '@/lib/server/guard';
import { amendNode, getNode, removeNode } from '@/lib/server/operations/wiring';

export const GET = serve(getNode, ({ things }) => ({ body: things.node }));

export const PATCH = serve(amendNode, async ({ holding, things, body }) => {
  const { house, node } = things;
  const given = merged(NodeCreate, asGiven(node), body);
  refuseUnlisted(given, node);
  return { body: await nodes.amendNode(holding, house.id, node.id, given, sealPassword) };
});

export const DELETE = serve(removeNode, async ({ holding, things, now }) => {
  await nodes.removeNode(holding, things.house.id, things.node.id, now);
  return {};
});
