import { pageOf } from '@/db/queries/page';
import * as invitations from '@/db/queries/invitation';
import { serve } from '@/lib/server/guard';
import { createInvitation, listInvitations } from '@/lib/server/operations/people';
import { invitationAnswer, invite } from '@/lib/server/people';

export const GET = serve(listInvitations, async ({ holding, query }) => ({
  body: pageOf((await invitations.listInvitations(holding, new Date())).map(invitationAnswer), query),
}));

export const POST = serve(createInvitation, async ({ holding, body, caller }) => {
  const { invitation, send } = await invite(holding, body, caller);
  return { status: 201, body: invitationAnswer(invitation), subject: invitation.email, after: send };
});
