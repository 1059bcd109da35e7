import * as nodes from '@/db/queries/node';
import { pageOf } from '@/db/queries/page';
import { refuseUnlisted, sealPassword } from '@/lib/server/node-bus';
import { serve } from '@/lib/server/guard';
import { createNode, listNodes } from '@/lib/server/operations/wiring';
import { hashToken, newToken } from '@/lib/server/tokens';

export const GET = serve(listNodes, async ({ holding, things, query }) => ({
  body: pageOf(await nodes.listNodes(holding, things.house.id), query),
}));

export const POST = serve(createNode, async ({ holding, things, body }) => {
  const token = newToken();
  refuseUnlisted(body);
  const node = await nodes.createNode(holding, things.house.id, body, hashToken(token), sealPassword);
  return { status: 201, body: { ...node, token }, subject: `${things.house.slug}/${node.key}` };
});
