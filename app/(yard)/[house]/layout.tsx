import type { ReactNode } from 'react';
import { LaidUp } from '@/components/shell/laid-up';
import { LockOutBar } from '@/components/shell/lock-out-bar';
import { inHolding } from '@/db/client';
import { readStandingLockouts } from '@/db/queries/lockout';
import { requireViewer, viewerHouse } from '@/lib/server/next-session';

/** A house that is not this holding's is not found, whichever page of it was asked for. */
export default async function HouseLayout({
  children,
  params,
}: {
  children: ReactNode;
  params: Promise<{ house: string }>;
}) {
  const house = await viewerHouse((await params).house);
  const { allowed, holdingId } = await requireViewer();
  const { id, slug, name } = house;
  if (house.laidUpAt !== null)
    return (
      <>
        <LaidUp house={{ slug, name }} mayServe={allowed.includes('holding.archive')} />
        {children}
      </>
    );
  const start = await inHolding(holdingId, (holding) => readStandingLockouts(holding, id));
  return (
    <>
      <LockOutBar house={{ id, slug }} start={start} mayRemove={allowed.includes('lockout.remove')} />
      {children}
    </>
  );
}
