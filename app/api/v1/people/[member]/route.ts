import { serve } from '@/lib/server/guard';
import { amendMember, removeMember } from '@/lib/server/operations/people';
import { changeMember, takeOut } from '@/lib/server/people';

export const PATCH = serve(amendMember, async ({ holding, things, body }) => ({
  body: await changeMember(holding, things.member, body.role),
  subject: things.member.email,
}));

export const DELETE = serve(removeMember, async ({ holding, things }) => {
  await takeOut(holding, things.member);
  return { subject: things.member.email };
});
