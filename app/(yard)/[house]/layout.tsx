import type { ReactNode } from 'react';
import { LaidUp } from '@/components/shell/laid-up';
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
  if (house.laidUpAt === null) return children;
  const { allowed } = await requireViewer();
  return (
    <>
      <LaidUp house={{ slug: house.slug, name: house.name }} mayServe={allowed.includes('holding.archive')} />
      {children}
    </>
  );
}
