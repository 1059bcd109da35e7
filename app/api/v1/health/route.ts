import { health } from '@/lib/server/health';
import { open } from '@/lib/server/open-route';
import { getHealth } from '@/lib/server/operations/open';

export const GET = open(getHealth, async () => {
  const body = await health();
  const up = [body.web, body.database, body.worker, body.field].every((part) => part.up);
  return Response.json(body, { status: up ? 200 : 503, headers: { 'cache-control': 'no-store' } });
});
