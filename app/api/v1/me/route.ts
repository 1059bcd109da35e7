import { serve } from '@/lib/server/guard';
import { getMe } from '@/lib/server/operations/people';
import { allowedTo } from '@/lib/server/permissions';

export const GET = serve(getMe, ({ caller }) => ({
  body: {
    name: caller.name,
    email: caller.userId === null ? null : caller.by,
    holding: { id: caller.holdingId, name: caller.holdingName },
    role: caller.role,
    allowed: allowedTo(caller.role),
  },
}));
