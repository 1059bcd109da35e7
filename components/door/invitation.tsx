import Link from 'next/link';
import { DoorSheet } from './door-frame';
import { JoinForm } from './join-form';

export interface InvitationFacts {
  id: string;
  token: string;
  email: string;
  role: string;
  holdingName: string;
  inviter: string;
  as: 'new' | 'known' | 'signed-in' | 'somebody-else';
}

export function Invitation({ facts }: { facts: InvitationFacts | null }) {
  if (facts === null) {
    return (
      <DoorSheet title="This invitation is no longer open">
        <p>
          It was taken up, taken back, or is older than seven days. Ask whoever invited you for a new one.
        </p>
        <p className="mt-4">
          <Link href="/sign-in" className="underline underline-offset-4">
            Sign in
          </Link>
        </p>
      </DoorSheet>
    );
  }
  const { id, token, email, role, holdingName, inviter, as } = facts;
  const here = `/invitation/${id}?token=${encodeURIComponent(token)}`;
  return (
    <DoorSheet title={`Look after ${holdingName}`}>
      <p className="mb-4">
        {inviter} invites you, {email}, as {role}.
      </p>
      {as === 'new' || as === 'signed-in' ? (
        <JoinForm id={id} token={token} email={email} isNew={as === 'new'} />
      ) : null}
      {as === 'known' ? (
        <p>
          You have an account already.{' '}
          <Link
            className="underline underline-offset-4"
            href={`/sign-in?email=${encodeURIComponent(email)}&next=${encodeURIComponent(here)}`}
          >
            Sign in to take it up
          </Link>
        </p>
      ) : null}
      {as === 'somebody-else' ? (
        <p>You are signed in as somebody else. Sign out first, then open this link again.</p>
      ) : null}
    </DoorSheet>
  );
}
