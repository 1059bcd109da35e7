import * as people from '@/db/queries/people';
import { serve } from '@/lib/server/guard';
import { cancelInvitation } from '@/lib/server/operations/people';

export const DELETE = serve(cancelInvitation, async ({ holding, things }) => {
  await people.cancelInvitation(holding, things.invitation.id);
  return { subject: things.invitation.email };
});
