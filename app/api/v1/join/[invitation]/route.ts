import { join } from '@/lib/server/join';
import { addressOf, countTry } from '@/lib/server/limits';
import { open } from '@/lib/server/open-route';
import { acceptInvitation } from '@/lib/server/operations/open';

export const POST = open(acceptInvitation, async ({ request, params, body }) => {
  countTry([`address join ${addressOf(request.headers)}`]);
  await join(params['invitation'] ?? '', body, request.headers);
  return new Response(null, { status: 204 });
});
