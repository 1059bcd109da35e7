import { createHmac, timingSafeEqual } from 'node:crypto';
import { env } from './env';
import type { Letter } from './mail';

export function resetLetter(user: { email: string; name: string }, token: string): Letter {
  return {
    to: user.email,
    subject: 'A new password for Middenward',
    text: [
      `Hello ${user.name},`,
      'somebody asked for a new password for this address. If it was you, set it within an hour here:',
      `${env().PUBLIC_URL}/reset-password?token=${encodeURIComponent(token)}`,
      'It signs you out everywhere. If it was not you, leave this letter alone: nothing has changed.',
    ].join('\n\n'),
  };
}

export interface InvitationFacts {
  id: string;
  email: string;
  role: string;
  holdingName: string;
  inviter: string;
}

export function invitationLetter(facts: InvitationFacts): Letter {
  const token = invitationToken(facts.id, facts.email);
  return {
    to: facts.email,
    subject: `${facts.inviter} invites you to ${facts.holdingName}`,
    text: [
      'Hello,',
      `${facts.inviter} invites you to look after the houses of ${facts.holdingName} in Middenward, as ${facts.role}.`,
      `Take it up within seven days here:\n${env().PUBLIC_URL}/invitation/${facts.id}?token=${token}`,
      'If you know nothing of this, leave this letter alone.',
    ].join('\n\n'),
  };
}

/**
 * Proves that who accepts an invitation reads the invited mailbox. The invitation's id alone would not: the owner who
 * invites sees it, and could make an account in somebody else's name.
 */
export function invitationToken(id: string, email: string): string {
  return createHmac('sha256', env().AUTH_SECRET)
    .update(`invitation:${id}:${email.toLowerCase()}`)
    .digest('base64url');
}

export function isInvitationToken(token: string, id: string, email: string): boolean {
  const wanted = Buffer.from(invitationToken(id, email));
  const given = Buffer.from(token);
  return wanted.length === given.length && timingSafeEqual(wanted, given);
}
