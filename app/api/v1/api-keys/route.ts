import * as keys from '@/db/queries/key';
import { pageOf } from '@/db/queries/page';
import { serve } from '@/lib/server/guard';
import { createKey, listKeys } from '@/lib/server/operations/people';
import { roleOf } from '@/lib/server/people';
import { hashToken, newToken } from '@/lib/server/tokens';

export const GET = serve(listKeys, async ({ holding, query }) => ({
  body: pageOf(await keys.listKeys(holding), query),
}));

export const POST = serve(createKey, async ({ holding, body, caller }) => {
  const key = newToken();
  const given = { name: body.name, role: roleOf(body.role), hash: hashToken(key), createdBy: caller.by };
  return { status: 201, body: { ...(await keys.createKey(holding, given)), key }, subject: body.name };
});
