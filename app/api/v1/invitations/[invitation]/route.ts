import * as invitations from '@/db/queries/invitation';
import { serve } from '@/lib/server/guard';
import { cancelInvitation } from '@/lib/server/operations/people';

export const DELETE = serve(cancelInvitation, async ({ holding, things }) => {
  await invitations.cancelInvitation(holding, things.invitation.id);
  return { subject: things.invitation.email };
});
