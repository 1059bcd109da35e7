import 'server-only';
import type { Holding } from '@/db/client';
import { createInvitation, type InvitationRow } from '@/db/queries/invitation';
import {
  changeRole,
  countOtherOwners,
  findFirstOwner,
  listMembers,
  removeMember,
  type MemberRow,
} from '@/db/queries/member';
import { Refusal } from '@/db/queries/refusal';
import type { Caller } from './caller';
import { invitationLetter } from './letters';
import { log } from './log';
import { sendLetter } from './mail';
import { isRole, OWNER, ROLES, type Role } from './permissions';

const INVITED_FOR_MS = 7 * 86_400_000;

/** @throws Refusal at `role` */
export function roleOf(given: string): Role {
  if (isRole(given)) return given;
  throw new Refusal('role', `Give one of: ${ROLES.join(', ')}.`);
}

export function memberAnswer({ id, name, email, role, since }: MemberRow) {
  return { id, name, email, role, since: since.toISOString() };
}

export function invitationAnswer({ id, email, role, expiresAt, createdAt }: InvitationRow) {
  return { id, email, role, expiresAt: expiresAt.toISOString(), createdAt: createdAt.toISOString() };
}

/** Somebody must be left who can let people in; the last owner neither goes nor becomes something else. */
async function keepAnOwner(holding: Holding, member: MemberRow): Promise<void> {
  if (member.role !== OWNER) return;
  if ((await countOtherOwners(holding, member.id, OWNER)) > 0) return;
  throw new Refusal(null, 'This is the last owner; make somebody else owner first.');
}

export async function changeMember(holding: Holding, member: MemberRow, given: string) {
  const role = roleOf(given);
  if (role !== OWNER) await keepAnOwner(holding, member);
  await changeRole(holding, member.id, role);
  return memberAnswer({ ...member, role });
}

export async function takeOut(holding: Holding, member: MemberRow): Promise<void> {
  await keepAnOwner(holding, member);
  await removeMember(holding, member);
}

/** The letter goes out once the invitation is kept; one that cannot be sent leaves the invitation to be sent again. */
export async function invite(
  holding: Holding,
  given: { email: string; role: string },
  caller: Caller,
): Promise<{ invitation: InvitationRow; send: () => Promise<void> }> {
  const role = roleOf(given.role);
  const email = given.email.toLowerCase();
  if ((await listMembers(holding)).some((row) => row.email === email)) {
    throw new Refusal('email', 'This person belongs to the holding already.');
  }
  const inviterId = caller.userId ?? (await findFirstOwner(holding, OWNER));
  if (inviterId === null) throw new Refusal(null, 'This holding has no owner to invite anybody.');
  const expiresAt = new Date(Date.now() + INVITED_FOR_MS);
  const invitation = await createInvitation(holding, { email, role, inviterId, expiresAt });
  const facts = { id: invitation.id, email, role, holdingName: caller.holdingName, inviter: caller.name };
  return {
    invitation,
    send: () =>
      sendLetter(invitationLetter(facts)).catch((error: unknown) => {
        log().error({ err: error }, 'an invitation was kept, but its letter could not be handed over');
      }),
  };
}
