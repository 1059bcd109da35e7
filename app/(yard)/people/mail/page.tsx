import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { LettersView } from '@/components/people/letters-view';
import { inHolding } from '@/db/client';
import { KeepFresh } from '@/components/ui/keep-fresh';
import { lettersOf } from '@/lib/server/letters-here';
import { mailStaysHere } from '@/lib/server/mail';
import { requireViewer } from '@/lib/server/next-session';

export const metadata: Metadata = { title: 'Letters' };

/** Only where no mail server is set up, and only to whom may invite. */
export default async function LettersPage() {
  const { holdingId, allowed } = await requireViewer();
  if (!mailStaysHere() || !allowed.includes('people.manage')) notFound();
  return (
    <>
      <KeepFresh everyS={10} />
      <LettersView letters={await inHolding(holdingId, lettersOf)} />
    </>
  );
}
