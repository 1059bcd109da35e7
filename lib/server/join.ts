import 'server-only';
import type { z } from 'zod';
import { inHolding } from '@/db/client';
import { addAudit } from '@/db/queries/audit';
import { acceptInvitation, findInvitation } from '@/db/queries/invitation';
import { findUserByEmail } from '@/db/queries/people';
import { isId } from '@/db/queries/reference';
import { Refusal } from '@/db/queries/refusal';
import type { InvitationAccept } from '@/lib/schema/people';
import { appNow } from './app-clock';
import { auth, getSessionFromHeaders, hashPassword } from './auth';
import { Problem } from './errors';
import { isInvitationToken } from './letters';

/** The invitation that a letter's link names, if its token proves that the letter was read; else null. */
export async function openInvitation(id: string, token: string) {
  const found = isId(id) ? await findInvitation(id, new Date()) : null;
  return found !== null && isInvitationToken(token, found.id, found.email) ? found : null;
}

/**
 * Takes up an invitation. Who has an account signs in with it first; who has none makes one here.
 * @throws Problem `not-found` for a wrong token as for no invitation
 */
export async function join(
  id: string,
  given: z.infer<typeof InvitationAccept>,
  headers: Headers,
): Promise<void> {
  const invitation = await openInvitation(id, given.token);
  if (invitation === null) throw new Problem('not-found');
  const { email } = invitation;
  const known = await findUserByEmail(email);
  const person = known === null ? await newPerson(given) : { userId: known.id };
  if (known !== null && (await getSessionFromHeaders(headers))?.userId !== known.id) {
    throw new Problem('not-signed-in', { detail: `Sign in as ${email} first, then take up the invitation.` });
  }
  const joined = await acceptInvitation(id, person, new Date());
  if (joined === null) throw new Problem('not-found');
  if (known !== null) {
    await auth().api.setActiveOrganization({ headers, body: { organizationId: joined.holdingId } });
  }
  const at = await appNow();
  await inHolding(joined.holdingId, (holding) =>
    addAudit(holding, { at, by: email, action: 'invitation.accept', subject: email, detail: {} }),
  );
}

async function newPerson({ name, password }: z.infer<typeof InvitationAccept>) {
  if (name === undefined) throw new Refusal('name', 'Say what you are called.');
  if (password === undefined) throw new Refusal('password', 'Choose a password.');
  return { name, passwordHash: await hashPassword(password) };
}

/** What the invited person's page shows; null for a link that is wrong, used up or too old. */
export interface InvitationFacts {
  id: string;
  token: string;
  email: string;
  role: string;
  holdingName: string;
  inviter: string;
  /** A new person chooses a password; a known one signs in; one who is signed in only says yes. */
  as: 'new' | 'known' | 'signed-in' | 'somebody-else';
}

export async function invitationFor(
  id: string,
  token: string,
  viewerEmail: string | null,
): Promise<InvitationFacts | null> {
  const found = await openInvitation(id, token);
  if (found === null) return null;
  const { email, role, holdingName, inviter } = found;
  const known = (await findUserByEmail(email)) !== null;
  const away = viewerEmail === null ? (known ? 'known' : 'new') : 'somebody-else';
  return { id, token, email, role, holdingName, inviter, as: viewerEmail === email ? 'signed-in' : away };
}
