import 'server-only';
import { everyHolding, type Holding } from '@/db/client';
import { listSinkMessages } from '@/db/queries/mail';
import { listInvitations } from '@/db/queries/invitation';
import { listMembers } from '@/db/queries/member';
import { listMemberships, findUserByEmail } from '@/db/queries/people';
import { Problem } from './errors';
import { mailStaysHere } from './mail';

/**
 * Letters of the local sink that an owner may read. They carry links that set passwords, so only those to people of
 * this holding and of no other: else the owner of one holding could become somebody of another.
 * @throws Problem `not-found` where a mail server is set up, and letters leave
 */
export async function lettersOf(holding: Holding) {
  if (!mailStaysHere()) throw new Problem('not-found');
  const own = new Set((await listMembers(holding)).map((row) => row.email));
  for (const row of await listInvitations(holding, new Date())) own.add(row.email);
  for (const email of own) {
    const user = await findUserByEmail(email);
    const elsewhere = user === null ? [] : await listMemberships(user.id);
    if (elsewhere.some((one) => one.holdingId !== holding.id)) own.delete(email);
  }
  const all = await listSinkMessages(everyHolding(), null, 500);
  return all
    .filter((letter) => own.has(letter.to.toLowerCase()))
    .map(({ id, at, from, to, subject, text }) => ({
      id,
      at: new Date(at).toISOString(),
      from,
      to,
      subject,
      text,
    }));
}
