import * as nodes from '@/db/queries/node';
import { NodeCreate } from '@/lib/schema/node';
import { merged } from '@/lib/server/check';
import { serve } from '@/lib/server/guard';
import { amendNode, getNode, removeNode } from '@/lib/server/operations/wiring';

export const GET = serve(getNode, ({ things }) => ({ body: things.node }));

export const PATCH = serve(amendNode, async ({ holding, things, body }) => ({
  body: await nodes.amendNode(
    holding,
    things.house.id,
    things.node.id,
    merged(NodeCreate, things.node, body),
  ),
}));

export const DELETE = serve(removeNode, async ({ holding, things, now }) => {
  await nodes.removeNode(holding, things.house.id, things.node.id, now);
  return {};
});
