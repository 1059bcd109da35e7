import { revokeTokens, rotateToken as rotate } from '@/db/queries/node';
import { serve } from '@/lib/server/guard';
import { revokeToken, rotateToken } from '@/lib/server/operations/wiring';
import { hashToken, newToken } from '@/lib/server/tokens';

export const POST = serve(rotateToken, async ({ holding, things }) => {
  const token = newToken();
  const node = await rotate(holding, things.house.id, things.node.id, hashToken(token));
  return { body: { ...node, token } };
});

export const DELETE = serve(revokeToken, async ({ holding, things }) => ({
  body: await revokeTokens(holding, things.house.id, things.node.id),
}));
